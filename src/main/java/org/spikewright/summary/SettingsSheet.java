package org.spikewright.summary;

import java.util.ArrayList;
import java.util.List;
import org.spikewright.judgement.Criteria;
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
    all.addAll(METHOD);
    Cautions.ALL.forEach(caution -> all.add(new Setting("Caution", "", caution, "")));
    return SheetPlan.table(
        NAME,
        COLUMNS,
        Lazily.map(all, SettingsSheet::cells),
        SheetPlan.Layout.table("SettingsTable"));
  }

  private static List<Setting> limits(Criteria criteria) {
    return List.of(
        limit("False alarms per straight series", criteria.falseAlarms()),
        limit("Bend, relative change: review above", criteria.bendToReview()),
        limit("Bend, relative change: repeat above", criteria.bendToRepeat()),
        limit("Correlation: note below", criteria.leastCorrelation()),
        limit("Top addition over native: too small below", criteria.leastTopAddition()),
        limit("Top addition over native: note above", criteria.largeTopAddition()),
        limit("Top addition over native: review above", criteria.largestTopAddition()),
        limit("Relative uncertainty to meet", criteria.targetUncertainty()));
  }

  private static Setting limit(String name, Limit limit) {
    return new Setting(
        "Limit",
        name,
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
