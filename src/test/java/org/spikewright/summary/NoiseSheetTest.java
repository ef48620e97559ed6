package org.spikewright.summary;

import static org.assertj.core.api.Assertions.assertThat;

import java.util.ArrayList;
import java.util.List;
import java.util.stream.Collectors;
import org.junit.jupiter.api.BeforeAll;
import org.junit.jupiter.api.Test;
import org.spikewright.fit.PoolEvidence;
import org.spikewright.testkit.Nights;
import org.spikewright.testkit.PooledNights;

class NoiseSheetTest {
  private static Night night;
  private static List<List<CellPlan>> noise;
  private static List<String> overview;

  @BeforeAll
  static void look() {
    night = PooledNights.closed();
    SummaryPlan plan = SummaryPlan.of(night);
    noise = rows(plan, NoiseSheet.NAME);
    overview = texts(rows(plan, OverviewSheet.NAME));
  }

  private static List<List<CellPlan>> rows(SummaryPlan plan, String name) {
    List<List<CellPlan>> rows = new ArrayList<>();
    plan.sheets().stream()
        .filter(sheet -> sheet.name().equals(name))
        .forEach(
            sheet -> {
              rows.addAll(sheet.head());
              sheet.rows().forEach(rows::add);
            });
    return rows;
  }

  private static List<String> texts(List<List<CellPlan>> rows) {
    return rows.stream()
        .map(
            row ->
                row.stream().map(NoiseSheetTest::text).collect(Collectors.joining(" | ")).strip())
        .toList();
  }

  private static String text(CellPlan cell) {
    if (cell instanceof CellPlan.Number number) {
      return String.valueOf(number.value());
    }
    return cell instanceof CellPlan.Text text ? text.text() : "";
  }

  /** The lines of a pool: in the first table, in the second. */
  private static List<List<CellPlan>> linesOf(String pool) {
    return noise.stream().filter(row -> !row.isEmpty() && text(row.get(0)).equals(pool)).toList();
  }

  @Test
  void eachPoolHasALineInBothTables() {
    night
        .evidence()
        .pools()
        .forEach(
            (key, pool) -> {
              List<List<CellPlan>> lines = linesOf(key.shown());
              assertThat(lines).as(key.shown()).hasSize(2).allMatch(line -> line.size() == 14);
              assertThat(text(lines.get(0).get(1))).isEqualTo(pool.tonight() + ".0");
            });
    assertThat(night.evidence().pools()).hasSize(4);
  }

  @Test
  void theNoiseFunctionOfTheSheetIsThatOfTheChart() {
    var largest = NoiseData.largest(night, SeriesIndex.of(night, java.util.Optional.empty()));
    assertThat(largest).isPresent();
    int row = NoiseSheet.rowOf(night, largest.get());
    assertThat(text(noise.get(row - 1).get(0))).isEqualTo(largest.get().shown());
    PoolEvidence pool = night.evidence().pools().get(largest.get());
    double constant = pool.flaskNoise().orElseThrow().constant();
    assertThat(((CellPlan.Number) noise.get(row - 1).get(3)).value()).isEqualTo(constant);
  }

  @Test
  void aSharedBendIsNamedWithTheSignalItReaches() {
    assertThat(text(linesOf("furnace, Pb, made up").get(1).get(11)))
        .startsWith("found: the lines of 20 series bend together; it takes over 5 % above");
    assertThat(text(linesOf("furnace, Cd, made up").get(1).get(11))).isEqualTo("not found");
    assertThat(overview)
        .anyMatch(line -> line.startsWith("furnace, Pb, made up: the lines of 20 series"));
  }

  @Test
  void aLevelThatIsOffIsNamedAsTheBenchSheetHasIt() {
    assertThat(text(linesOf("furnace, Cd, made up").get(1).get(12)))
        .matches("the level 60 µL: delivered \\+(9|10|11)\\.\\d % in 14 series \\(p < 0\\.001\\)");
    assertThat(overview).anyMatch(line -> line.startsWith("furnace, Cd, made up: the level 60 µL"));
  }

  @Test
  void weightsAreAdvisedWhereTheyGain() {
    assertThat(text(linesOf("furnace, Pb, made up").get(0).get(12)))
        .isEqualTo("settle the shared bend first: here it passes for noise");
    assertThat(text(linesOf("furnace, Cd, made up").get(0).get(12)))
        .isEqualTo("settle the level that is off first: here it passes for noise");
    assertThat(text(linesOf("furnace, Zn, made up").get(0).get(12)))
        .matches("weights = \"pool\" is set: it narrows the usual interval by \\d+ %");
    assertThat(text(linesOf("furnace, Ni, made up").get(0).get(12)))
        .isEqualTo("too few series to advise");
  }

  @Test
  void aPoolThatIsTooSmallSaysSoAndBorrowsFromItsInstrument() {
    assertThat(text(linesOf("furnace, Ni, made up").get(0).get(13)))
        .isEqualTo(
            "too small: 4 of the 10 series it takes; borrows the relative noise of all of furnace");
    assertThat(linesOf("furnace, all its pools")).hasSize(1);
  }

  @Test
  void theOddSlopeOfTheWrongStockIsCountedForItsPool() {
    assertThat(text(linesOf("furnace, Zn, made up").get(1).get(6))).isEqualTo("1.0");
    assertThat(text(linesOf("furnace, Cd, made up").get(1).get(6))).isEqualTo("0.0");
  }

  @Test
  void aColdStartAndADayInProgressAreSaid() {
    assertThat(texts(noise)).anyMatch(line -> line.startsWith("A cold start"));
    assertThat(overview).noneMatch(line -> line.contains("provisional"));
    SummaryPlan open = SummaryPlan.of(PooledNights.inProgress());
    assertThat(texts(rows(open, NoiseSheet.NAME)))
        .anyMatch(line -> line.startsWith("The pools are provisional"));
    assertThat(texts(rows(open, OverviewSheet.NAME)))
        .contains("Pools provisional: the day is in progress.");
  }

  @Test
  void theOverviewCountsEveryFlagOfTheFamilyAndTheIntervalsFromPools() {
    long tested =
        java.util.stream.StreamSupport.stream(night.results().spliterator(), false)
            .filter(
                row ->
                    row.flags().stream()
                        .anyMatch(
                            List.of(
                                    "bent",
                                    "odd-flask",
                                    "odd-level",
                                    "noisy",
                                    "suspected-slip",
                                    "odd-slope")
                                ::contains))
            .count();
    assertThat(tested).isPositive();
    assertThat(overview).contains("statistical flags raised | " + tested + ".0");
    assertThat(overview).contains("intervals from a pool | " + PooledNights.LINES + ".0");
  }

  @Test
  void aNightWithoutPoolsSaysSo() {
    SummaryPlan plan = SummaryPlan.of(Nights.empty());
    assertThat(texts(rows(plan, NoiseSheet.NAME)))
        .contains("No pool: no series of three flasks or more.");
    assertThat(rows(plan, NoiseData.NAME)).hasSize(1);
  }
}
