package org.spikewright.summary;

import static org.assertj.core.api.Assertions.assertThat;

import java.util.ArrayList;
import java.util.List;
import java.util.concurrent.atomic.AtomicInteger;
import org.junit.jupiter.api.Test;
import org.spikewright.judgement.Verdict;
import org.spikewright.testkit.Nights;
import org.spikewright.testkit.PooledNights;

class SummaryPlanTest {

  private static List<List<CellPlan>> rows(SheetPlan sheet) {
    List<List<CellPlan>> rows = new ArrayList<>(sheet.head());
    sheet.rows().forEach(rows::add);
    return rows;
  }

  private static SheetPlan sheet(SummaryPlan plan, String name) {
    return plan.sheets().stream().filter(s -> s.name().equals(name)).findFirst().orElseThrow();
  }

  private static String text(CellPlan cell) {
    return cell instanceof CellPlan.Text text ? text.text() : "";
  }

  @Test
  void theSheetsComeInTheOrderInWhichTheyAreRead() {
    assertThat(SummaryPlan.of(Nights.small()).sheets())
        .extracting(SheetPlan::name)
        .containsExactly(
            "Overview",
            "Results",
            "To repeat",
            "Series",
            "Plot",
            "Noise",
            "Controls",
            "Files",
            "Refused rows",
            "Settings",
            "Plot data",
            "Noise data");
  }

  @Test
  void everyLinkLeadsToTheHeadingOfItsSeries() {
    SummaryPlan plan = SummaryPlan.of(Nights.small());
    List<List<CellPlan>> series = rows(sheet(plan, "Series"));
    int links = 0;
    for (List<CellPlan> row : sheet(plan, "Results").rows()) {
      CellPlan.Link link = (CellPlan.Link) row.get(20);
      List<CellPlan> heading = series.get(link.row() - 1);
      assertThat(text(heading.get(0))).isEqualTo(text(row.get(3)));
      assertThat(text(heading.get(1))).startsWith(text(row.get(0)) + " · " + text(row.get(1)));
      links++;
    }
    assertThat(links).isEqualTo(12);
  }

  @Test
  void thePlotDataNameTheRowOfEachSeriesFirstFlask() {
    SummaryPlan plan = SummaryPlan.of(Nights.small());
    List<List<CellPlan>> series = rows(sheet(plan, "Series"));
    int seen = 0;
    for (List<CellPlan> row : sheet(plan, "Plot data").rows()) {
      int flasks = (int) ((CellPlan.Number) row.get(2)).value();
      int first = (int) ((CellPlan.Number) row.get(1)).value();
      assertThat(text(row.get(0))).startsWith(++seen + " · ");
      for (int i = 0; i < flasks; i++) {
        assertThat(text(series.get(first - 1 + i).get(0))).matches("[FS]\\d");
      }
    }
    assertThat(seen).isEqualTo(12);
  }

  @Test
  void storedAndLiveNumbersAgreeOnEverySeries() {
    SeriesIndex index = SeriesIndex.of(Nights.large(300), java.util.Optional.empty());
    assertThat(index.entries()).hasSize(300);
    assertThat(index.differing()).isZero();
  }

  @Test
  void storedAndLiveNumbersAgreeOnWeightedLinesAndOnTheIntervalsOfPools() {
    Night night = PooledNights.closed();
    SeriesIndex index = SeriesIndex.of(night, java.util.Optional.empty());
    assertThat(index.differing()).isZero();
    int weighted = 0;
    int pooled = 0;
    for (var outcome : night.outcomes()) {
      SeriesBlock block = SeriesBlock.of(outcome, 10);
      assertThat(block.rows()).hasSize(block.height());
      if (block.live().isPresent()) {
        LiveCells live = block.live().get();
        weighted += live.quantities().get(0).formula().startsWith("SUMPRODUCT") ? 1 : 0;
        pooled += live.pooled().stream().filter(LiveCells.Quantity::isChecked).count() == 7 ? 1 : 0;
      }
    }
    assertThat(weighted).isEqualTo(PooledNights.WEIGHTED);
    assertThat(pooled).isEqualTo(PooledNights.LINES);
  }

  @Test
  void aStoredNumberThatIsNotTheOneOfTheFlasksIsFound() {
    var outcome = Nights.water("BW-1", "Pb", 12, Nights.Shape.STRAIGHT);
    var result = outcome.result().orElseThrow();
    LiveCells cells = LiveCells.of(result, FlaskLine.of(outcome), 5);
    LiveCells.Quantity value = cells.quantities().get(4);
    assertThat(value.title()).isEqualTo("Result");
    assertThat(value.agrees()).isTrue();
    double off = value.stored().getAsDouble() * (1 + 1e-6);
    var wrong =
        new LiveCells.Quantity(
            "Result",
            java.util.OptionalDouble.of(off),
            value.live(),
            value.formula(),
            value.size(),
            value.format());
    assertThat(wrong.agrees()).isFalse();
  }

  @Test
  void onANightOfThousandsTheSeriesSheetHoldsThoseThatNeedAPerson() {
    Night night = Nights.large(Night.EVERY_SERIES + 50);
    int needed = 0;
    for (ResultRow row : night.results()) {
      needed += row.verdict() == Verdict.REPORT ? 0 : 1;
    }
    SummaryPlan plan = SummaryPlan.of(night);
    long headings =
        rows(sheet(plan, "Series")).stream()
            .filter(row -> row.size() == 2 && text(row.get(1)).startsWith("BW-"))
            .count();
    assertThat(needed).isBetween(50, Night.EVERY_SERIES);
    assertThat(headings).isEqualTo(needed);
    assertThat(text(sheet(plan, "Series").head().get(1).get(0)))
        .contains("the " + needed + " series that need a person")
        .contains("flasks-2025-01-15-r1.csv");
  }

  @Test
  void planAndRowsTogetherWalkTheOutcomesTwice() {
    Night night = Nights.small();
    AtomicInteger walks = new AtomicInteger();
    Night counted =
        new Night(
            night.labDay(),
            night.revision(),
            night.moment(),
            night.inProgress(),
            night.zone(),
            night.laboratory(),
            night.seriesCount(),
            night.results(),
            () -> {
              walks.incrementAndGet();
              return night.outcomes().iterator();
            },
            night.files(),
            night.refused(),
            night.settings(),
            night.criteria(),
            night.evidence(),
            night.controls());
    SummaryPlan.of(counted).sheets().forEach(SummaryPlanTest::rows);
    assertThat(walks).hasValue(2);
  }

  @Test
  void aNightWithoutSeriesHasEverySheet() {
    SummaryPlan plan = SummaryPlan.of(Nights.empty());
    assertThat(plan.sheets()).hasSize(12);
    assertThat(text(rows(sheet(plan, "Plot")).get(0).get(0))).isEqualTo("No series to plot");
    assertThat(text(sheet(plan, "To repeat").head().get(0).get(0))).isEqualTo("Nothing to repeat");
  }

  @Test
  void decimalsFollowTheTextToReport() {
    ResultRow row = ResultRow.of(Nights.water("BW-1", "Pb", 12.4, Nights.Shape.STRAIGHT));
    assertThat(row.reported()).matches("\\d+\\.\\d\\d ± 0\\.\\d\\d");
    assertThat(Formats.ofResult(row)).isEqualTo("0.00");
    assertThat(Formats.significant(123.4, 2)).isEqualTo("0");
    assertThat(Formats.significant(0.0123, 2)).isEqualTo("0.000");
    assertThat(Formats.significant(1e-7, 2)).isEqualTo("0.000E+00");
  }
}
