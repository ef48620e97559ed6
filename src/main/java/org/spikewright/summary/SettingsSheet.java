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

  private static final List<Setting> METHOD =
      List.of(
          new Setting(
              "Calculation",
              "Unit of evidence",
              "the flask; its readings are averaged first",
              "replicates of one flask are not independent preparations"),
          new Setting(
              "Calculation",
              "Line",
              "ordinary least squares on flask means",
              "Danzer and Currie, Pure Appl. Chem. 70 (1998) 993; Miller and Miller, Statistics"
                  + " and Chemometrics for Analytical Chemistry, ch. 5"),
          new Setting(
              "Calculation",
              "95 % interval",
              "Fieller's interval of the x-intercept, asymmetric",
              "Fieller, J. R. Stat. Soc. B 16 (1954) 175"),
          new Setting(
              "Calculation",
              "Uncertainty in flags and in the text to report",
              "U is t times the series' own standard error",
              "of the fit alone; volumes, stock and blank are not in it yet"),
          new Setting(
              "Calculation",
              "Bend",
              "quadratic coefficient, one-sided towards saturation",
              "Mandel, The Statistical Analysis of Experimental Data (1964); ISO 8466-1"),
          new Setting(
              "Calculation",
              "Odd flask",
              "externally studentised (deleted) residual",
              "Cook and Weisberg, Residuals and Influence in Regression (1982), ch. 2"),
          new Setting(
              "Calculation",
              "Several tests on one series",
              "Holm's procedure at the false-alarm rate",
              "Holm, Scand. J. Statist. 6 (1979) 65"),
          new Setting(
              "Calculation",
              "Detection limit",
              "errors of 5 % of either kind",
              "Currie, Pure Appl. Chem. 67 (1995) 1699; ISO 11843-2"));

  private SettingsSheet() {}

  static SheetPlan of(Night night) {
    List<Setting> all = new ArrayList<>(night.settings());
    all.addAll(limits(night.criteria()));
    all.addAll(RepeatSettings.of(night.criteria().repeat()));
    all.addAll(METHOD);
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
