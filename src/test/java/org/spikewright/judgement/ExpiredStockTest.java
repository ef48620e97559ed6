package org.spikewright.judgement;

import static org.assertj.core.api.Assertions.assertThat;

import java.time.LocalDate;
import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.spikewright.reading.Accuracies;
import org.spikewright.reading.Bottle;
import org.spikewright.reading.FlaskFacts;
import org.spikewright.reading.Recorded;
import org.spikewright.series.AdditionSeries;
import org.spikewright.series.SeriesNote;
import org.spikewright.testkit.Bench;

/** Series of 4 March 2026 whose additions are of a named stock. */
class ExpiredStockTest {
  private static AdditionSeries series(Optional<Bottle> unspiked, Optional<Bottle> spiked) {
    List<Recorded> readings = new ArrayList<>();
    for (int i = 0; i < 4; i++) {
      FlaskFacts plain = Bench.madeUp(i);
      FlaskFacts facts =
          new FlaskFacts(
              plain.role(),
              plain.design(),
              plain.addition(),
              plain.aliquot(),
              plain.finalVolume(),
              plain.startVolume(),
              plain.preparation(),
              plain.blanks(),
              plain.method(),
              plain.internalStandard(),
              Accuracies.NONE,
              i == 0 ? unspiked : spiked);
      readings.add(Bench.recorded(Bench.reading(facts, "1", 0.2 + 0.1 * i, i)));
    }
    return Bench.series(readings);
  }

  private static Optional<Bottle> bottle(String lastDay) {
    return Optional.of(new Bottle("Cd 10", Optional.ofNullable(lastDay).map(LocalDate::parse)));
  }

  @ParameterizedTest(name = "last day {0}: {1} flags")
  @CsvSource(
      nullValues = "-",
      value = {"2026-03-03,1", "2026-03-04,0", "2026-03-05,0", "-,0"})
  void aStockPastItsLastDayIsNoted(String lastDay, int flags) {
    AdditionSeries series = series(bottle(lastDay), bottle(lastDay));
    List<Flag> found =
        DesignFlags.of(series, Criteria.defaults()).stream()
            .filter(f -> f.kind() == FlagKind.EXPIRED_STOCK)
            .toList();
    assertThat(found).hasSize(flags);
    assertThat(found)
        .allSatisfy(
            flag -> {
              assertThat(flag.weight()).isEqualTo(Flag.Weight.NOTE);
              assertThat(flag.sentence())
                  .isEqualTo("Spiked with an expired stock: Cd 10, last day 2026-03-03.");
            });
  }

  @Test
  void aFlaskWithoutAdditionHoldsNoStock() {
    assertThat(series(bottle("2026-01-01"), bottle("2026-12-31")).notes())
        .extracting(SeriesNote::kind)
        .doesNotContain(SeriesNote.Kind.EXPIRED_STOCK);
    assertThat(series(bottle("2026-12-31"), bottle("2026-01-01")).notes())
        .extracting(SeriesNote::kind)
        .contains(SeriesNote.Kind.EXPIRED_STOCK);
    assertThat(series(Optional.empty(), Optional.empty()).notes()).isEmpty();
  }
}
