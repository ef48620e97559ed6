package org.spikewright.series;

import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.within;
import static org.spikewright.testkit.Bench.madeUp;
import static org.spikewright.testkit.Bench.madeUpSeries;
import static org.spikewright.testkit.Bench.oneVessel;
import static org.spikewright.testkit.Bench.reading;
import static org.spikewright.testkit.Bench.recorded;
import static org.spikewright.testkit.Bench.series;
import static org.spikewright.testkit.Bench.statedSeries;

import java.util.List;
import java.util.Optional;
import org.junit.jupiter.api.Test;
import org.spikewright.quantity.Quantity;
import org.spikewright.quantity.Unit;
import org.spikewright.reading.Addition;
import org.spikewright.reading.FlaskFacts;
import org.spikewright.testkit.Bench;

/** How a slope becomes comparable from series to series, and an addition from flask to flask. */
class SensitivityTest {

  /** 10 mL in 50 mL: 1 mg/L on the axis is 0.2 mg/L in the flask, or 0.2e-3 g/L. */
  @Test
  void madeUpFlasksDiluteTheAliquot() {
    assertThat(series(madeUpSeries(1, 2, 3)).toSensitivity()).isCloseTo(5e3, within(1e-9));
  }

  /** 10 mL in a vessel of 20 mL. */
  @Test
  void oneVesselDilutesBeforeTheFirstAddition() {
    AdditionSeries series =
        series(
            List.of(
                recorded(reading(oneVessel(0), "1", 2.0, 0)),
                recorded(reading(oneVessel(1), "1", 3.0, 1))));
    assertThat(series.toSensitivity()).isCloseTo(2e3, within(1e-9));
  }

  @Test
  void statedAdditionsWithoutVolumesAreTakenAsTheyStand() {
    AdditionSeries series = series(statedSeries(new double[] {0, 1}, new double[] {1, 2}));
    assertThat(series.toSensitivity()).isCloseTo(1e3, within(1e-9));
  }

  @Test
  void additionsWrittenInOtherUnitsAreOneLevel() {
    FlaskFacts inMl = madeUp(0.3);
    Flask millilitres = series(List.of(recorded(reading(inMl, "1", 1, 0)))).flasks().get(0);
    Flask microlitres =
        series(List.of(recorded(reading(inMicrolitres(inMl, 300), "1", 1, 0)))).flasks().get(0);
    assertThat(millilitres.delivered()).isEqualTo(3e-4).isEqualTo(microlitres.delivered());
  }

  private static FlaskFacts inMicrolitres(FlaskFacts facts, double volume) {
    return new FlaskFacts(
        facts.role(),
        facts.design(),
        new Addition.OfStock(new Quantity(volume, Unit.of("µL")), Bench.mgPerL(10)),
        facts.aliquot(),
        facts.finalVolume(),
        Optional.empty(),
        facts.preparation(),
        facts.blanks(),
        facts.method());
  }
}
