package org.spikewright.summary;

import static org.assertj.core.api.Assertions.assertThat;

import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.stream.Collectors;
import org.junit.jupiter.api.BeforeAll;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;
import org.spikewright.judgement.Outcome;
import org.spikewright.testkit.PooledNights;

/** What the other sheets show of pools, budgets and electrodes. */
class EvidenceSheetsTest {
  private static Night night;
  private static SummaryPlan plan;

  @BeforeAll
  static void look() {
    night = PooledNights.closed();
    plan = SummaryPlan.of(night);
  }

  private static List<List<CellPlan>> rows(String name) {
    List<List<CellPlan>> rows = new ArrayList<>();
    plan.sheets().stream()
        .filter(sheet -> sheet.name().equals(name))
        .forEach(sheet -> sheet.rows().forEach(rows::add));
    return rows;
  }

  private static Outcome outcome(String sample, String analyte) {
    for (Outcome outcome : night.outcomes()) {
      var subject = outcome.gathered().key().subject();
      if (subject.sample().text().equals(sample) && subject.analyte().equals(analyte)) {
        return outcome;
      }
    }
    throw new AssertionError(sample + " " + analyte);
  }

  private static List<CellPlan> result(String sample, String analyte) {
    return rows(ResultsSheet.NAME).stream()
        .filter(row -> text(row.get(0)).equals(sample) && text(row.get(1)).equals(analyte))
        .findFirst()
        .orElseThrow();
  }

  private static String text(CellPlan cell) {
    return cell instanceof CellPlan.Text text ? text.text() : "";
  }

  private static double number(CellPlan cell) {
    return ((CellPlan.Number) cell).value();
  }

  @Test
  void aResultShowsItsUncertaintyAndWhoseIntervalIsReported() {
    var found = outcome("BW-0413", "Cd").result().orElseThrow();
    List<CellPlan> row = result("BW-0413", "Cd");
    assertThat(number(row.get(7))).isEqualTo(found.budget().orElseThrow().expandedUncertainty());
    assertThat(number(row.get(8)))
        .isEqualTo(found.borrowed().orElseThrow().lower95().orElseThrow());
    assertThat(number(row.get(8))).isNotEqualTo(found.lower95().orElseThrow());
    assertThat(text(row.get(10))).isEqualTo("pool");
    assertThat(number(row.get(11))).isPositive();
  }

  @Test
  void anElectrodesResultShowsTheUncertaintyThatItsTextStates() {
    var found = outcome("Mill race", "F").electrode().orElseThrow();
    List<CellPlan> row = result("Mill race", "F");
    assertThat(number(row.get(7))).isEqualTo(found.expandedUncertainty().orElseThrow());
    assertThat(number(row.get(8))).isLessThan(found.value());
    assertThat(text(row.get(10))).isEqualTo("own");
    assertThat(row.get(11)).isEqualTo(CellPlan.EMPTY);
  }

  @Test
  void thePlotsIntervalIsTheReportedOne() {
    SeriesIndex index = SeriesIndex.of(night, Optional.empty());
    Outcome cadmium = outcome("BW-0413", "Cd");
    var found = cadmium.result().orElseThrow();
    SeriesIndex.Entry entry = index.entries().get(cadmium.gathered().key());
    assertThat(entry.lower95()).isEqualTo(found.reportedEstimate().lower95());
    assertThat(entry.lower95()).isNotEqualTo(found.estimate().lower95());
    assertThat(entry.upper95()).isEqualTo(found.reportedEstimate().upper95());
  }

  @Test
  void anElectrodesSeriesShowsItsCurveInsteadOfALine() {
    SeriesBlock block = SeriesBlock.of(outcome("Mill race", "F"), 4);
    assertThat(block.live()).isEmpty();
    assertThat(block.flasks()).hasSize(6).allMatch(flask -> flask.fitted().isPresent());
    assertThat(block.evidence().get(0))
        .startsWith("Curve of the electrode: slope −58.")
        .contains("% of theory; 3 degrees of freedom");
    assertThat(block.rows()).hasSize(block.height());
    assertThat(SeriesIndex.of(night, Optional.empty()).curves()).isEqualTo(2);
  }

  @ParameterizedTest
  @ValueSource(
      strings = {
        "Smyth, Stat. Appl. Genet. Mol. Biol. 3 (2004) 3",
        "Phipson, Lee, Majewski, Alexander and Smyth, Ann. Appl. Stat. 10 (2016) 946",
        "Holm, Scand. J. Statist. 6 (1979) 65",
        "Fieller, J. R. Stat. Soc. B 16 (1954) 175",
        "JCGM 100:2008",
        "Currie, Pure Appl. Chem. 67 (1995) 1699"
      })
  void theSettingsNameTheMethods(String source) {
    String settings =
        rows(SettingsSheet.NAME).stream()
            .flatMap(List::stream)
            .map(EvidenceSheetsTest::text)
            .collect(Collectors.joining("\n"));
    assertThat(settings).contains(source).doesNotContain("not in it yet");
  }
}
