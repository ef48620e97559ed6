package org.spikewright.summary;

import static org.assertj.core.api.Assertions.assertThat;

import java.util.ArrayList;
import java.util.List;
import org.junit.jupiter.api.Test;
import org.spikewright.analysis.ControlHistory;
import org.spikewright.analysis.ControlKey;
import org.spikewright.analysis.ControlRule.Kind;
import org.spikewright.analysis.ControlRule.Limits;
import org.spikewright.analysis.Evidence;
import org.spikewright.testkit.ControlBench;
import org.spikewright.testkit.ControlNight;
import org.spikewright.testkit.Nights;

class ControlsSheetTest {

  private static SheetPlan sheet(Evidence evidence) {
    return ControlsSheet.of(Nights.with(evidence.found()));
  }

  private static List<String> texts(SheetPlan sheet) {
    List<String> texts = new ArrayList<>();
    for (List<CellPlan> row : sheet.rows()) {
      StringBuilder line = new StringBuilder();
      for (CellPlan cell : row) {
        if (cell instanceof CellPlan.Text text) {
          line.append(text.text()).append('|');
        } else if (cell instanceof CellPlan.Number number) {
          line.append(number.value()).append('|');
        }
      }
      texts.add(line.toString());
    }
    return texts;
  }

  @Test
  void aNightWithoutControlsSaysSoPartByPart() {
    List<String> texts = texts(sheet(Evidence.NONE));
    assertThat(texts)
        .contains(
            "no control|",
            "no duplicate|",
            "no blank|",
            "no drift check|",
            "no external calibration|",
            "no sample with several series|",
            "no element at several lines|");
    assertThat(sheet(Evidence.NONE).charts()).isEmpty();
  }

  @Test
  void whatIsOutStandsFirstWithItsLimitsAndWhereTheyComeFrom() {
    List<String> texts = texts(sheet(ControlNight.evidence()));
    int header =
        texts.indexOf(texts.stream().filter(t -> t.startsWith("Control|")).findFirst().get());
    assertThat(texts.get(header + 1))
        .startsWith("QC high|control sample|QC high|Cd|")
        .contains("|out|");
    assertThat(texts).anyMatch(t -> t.contains("provisional, from 6 points"));
    assertThat(texts).anyMatch(t -> t.contains("from 24 points") && !t.contains("provisional"));
    assertThat(texts).anyMatch(t -> t.contains("|W-1|") && t.contains("|disagree|"));
  }

  @Test
  void chartsReadTheCellsThatHoldTheirPoints() {
    SheetPlan sheet = sheet(ControlNight.evidence());
    List<List<CellPlan>> rows = new ArrayList<>();
    sheet.rows().forEach(rows::add);
    assertThat(sheet.charts()).isNotEmpty();
    for (ChartPlan chart : sheet.charts()) {
      for (ChartPlan.Trace trace : ((ChartPlan.Scatter) chart).traces()) {
        for (ChartPlan.Cells cells : List.of(trace.x(), trace.y())) {
          assertThat(held(rows, cells.range())).isEqualTo(cells.cached());
        }
      }
    }
  }

  private static List<Double> held(List<List<CellPlan>> rows, String range) {
    String[] parts = range.substring(range.indexOf('!') + 1).replace("$", "").split(":");
    int column = parts[0].charAt(0) - 'A';
    int first = Integer.parseInt(parts[0].substring(1));
    int last = Integer.parseInt(parts[1].substring(1));
    List<Double> held = new ArrayList<>();
    for (int row = first; row <= last; row++) {
      held.add(((CellPlan.Number) rows.get(row - 1).get(column)).value());
    }
    return held;
  }

  @Test
  void manyControlsHaveAFewChartsAndASentence() {
    List<org.spikewright.analysis.ControlRule> rules = new ArrayList<>();
    List<org.spikewright.series.AdditionSeries> night = new ArrayList<>();
    java.util.Map<ControlKey, List<org.spikewright.analysis.ControlPoint>> past =
        new java.util.HashMap<>();
    for (int i = 10; i < 22; i++) {
      String name = "QC " + i;
      rules.add(ControlBench.rule(name, Kind.CONTROL_SAMPLE, i, 0, Limits.NONE));
      night.add(ControlBench.Sample.of(name, i).series());
      ControlKey key = new ControlKey(name, Kind.CONTROL_SAMPLE, "furnace", "Cd", "");
      past.putAll(ControlBench.history(key, i, i + 0.1, i - 0.1).points());
    }
    Evidence evidence = ControlBench.evidence(rules, night, List.of(), new ControlHistory(past));
    SheetPlan sheet = sheet(evidence);
    assertThat(sheet.charts()).hasSize(8);
    assertThat(texts(sheet)).anyMatch(t -> t.contains("Shown are 8 of 12 controls"));
  }

  @Test
  void theOverviewCountsControlsInAndOut() {
    List<String> texts =
        texts(SummaryPlan.of(Nights.with(ControlNight.evidence().found())).sheets().get(0));
    assertThat(texts).contains("controls|2.0|1.0|0.0|").contains("duplicates|0.0|1.0|0.0|");
  }
}
