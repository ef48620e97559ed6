package org.spikewright.summary;

import java.util.ArrayList;
import java.util.List;
import java.util.TreeMap;
import org.spikewright.judgement.CriteriaBook;
import org.spikewright.judgement.Criterion;
import org.spikewright.judgement.Limit;
import org.spikewright.quantity.Numbers;

/** What produced the numbers: program, configuration, limits, methods. */
final class SettingsSheet {
  static final String NAME = "Settings";

  private static final List<ColumnPlan> COLUMNS =
      List.of(
          ColumnPlan.text("Group", 20),
          ColumnPlan.text("Setting", 34),
          ColumnPlan.text("Value", 56),
          ColumnPlan.text("Where it comes from", 70));

  private SettingsSheet() {}

  static SheetPlan of(Night night) {
    List<Setting> all = new ArrayList<>(night.settings());
    all.addAll(limits(night.criteria()));
    all.addAll(RepeatSettings.of(night.criteria().repeat()));
    all.addAll(MethodSettings.ALL);
    Cautions.ALL.forEach(caution -> all.add(new Setting("Caution", "", caution, "")));
    return SheetPlan.table(
        NAME,
        COLUMNS,
        Lazily.map(all, SettingsSheet::cells),
        SheetPlan.Layout.table("SettingsTable"));
  }

  private static List<Setting> limits(CriteriaBook book) {
    List<Setting> limits = new ArrayList<>();
    book.general()
        .limits()
        .forEach((criterion, limit) -> limits.add(limit("Limit", criterion, limit)));
    new TreeMap<>(book.methods())
        .forEach(
            (method, own) ->
                own.limits()
                    .forEach(
                        (criterion, limit) -> {
                          if (!limit.equals(book.general().of(criterion))) {
                            limits.add(limit("Limit, " + method, criterion, limit));
                          }
                        }));
    return limits;
  }

  private static Setting limit(String group, Criterion criterion, Limit limit) {
    return new Setting(
        group,
        criterion.words(),
        Numbers.plain(limit.value()) + (limit.on() ? "" : " (off)"),
        limit.source().words() + ": " + limit.reason());
  }

  private static List<CellPlan> cells(Setting setting) {
    return List.of(
        CellPlan.text(setting.group()),
        CellPlan.text(setting.name(), Look.WRAPPED),
        CellPlan.text(setting.value(), Look.WRAPPED),
        CellPlan.text(setting.origin(), Look.WRAPPED));
  }
}
