package org.spikewright.series;

import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.within;

import java.time.Instant;
import java.util.ArrayList;
import java.util.Collections;
import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.Random;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.spikewright.reading.Batch;
import org.spikewright.reading.BatchReading;
import org.spikewright.reading.Calculation;
import org.spikewright.reading.CheckReading;
import org.spikewright.reading.FlaskFacts;
import org.spikewright.reading.MethodFacts;
import org.spikewright.reading.Reading;
import org.spikewright.reading.Recorded;
import org.spikewright.reading.Signal;
import org.spikewright.reading.Spread;
import org.spikewright.testkit.Bench;
import org.spikewright.testkit.ControlBench;

class DriftCorrectionTest {
  private static final List<CheckReading> FALLING =
      List.of(
          ControlBench.check("CCV", 0, 1.0),
          ControlBench.check("CCV", 60, 0.8),
          ControlBench.check("CCV", 120, 0.9),
          ControlBench.check("Other", 30, 55));

  @ParameterizedTest(name = "after {0} min: {1}")
  @CsvSource({"0, 1", "30, 0.9", "60, 0.8", "90, 0.85", "120, 0.9", "-20, 1", "500, 0.9"})
  void theFactorIsLinearInTimeBetweenChecksAndKeptBeyondThem(long minute, double signal) {
    DriftCorrection correction = DriftCorrection.of(FALLING);
    assertThat(correction.factorAt(ControlBench.time(minute))).isCloseTo(1 / signal, within(1e-12));
    assertThat(correction.brackets(ControlBench.time(minute)))
        .isEqualTo(minute >= 0 && minute <= 120);
  }

  @Test
  void theOrderOfTheReadingsDoesNotCount() {
    for (int seed = 0; seed < 20; seed++) {
      List<CheckReading> shuffled = new ArrayList<>(FALLING);
      Collections.shuffle(shuffled, new Random(seed));
      assertThat(DriftCorrection.of(shuffled).factorAt(ControlBench.time(77)))
          .as("seed %d", seed)
          .isEqualTo(DriftCorrection.of(FALLING).factorAt(ControlBench.time(77)));
    }
  }

  @Test
  void signalsAreCorrectedOnlyWhereTheMethodAsks() {
    List<BatchReading> checks =
        List.of(
            new CheckReading(
                Bench.SUBJECT,
                new Batch("run1.csv", false),
                Optional.of(Bench.START),
                1,
                new Signal.Value(1.0, "1.0"),
                ControlBench.position(1)),
            new CheckReading(
                Bench.SUBJECT,
                new Batch("run1.csv", false),
                Optional.of(Bench.START.plusSeconds(600)),
                1,
                new Signal.Value(0.8, "0.8"),
                ControlBench.position(2)));
    Drifts drifts = new Drifts(checks);
    FlaskFacts plain = Bench.madeUp(1);
    List<Recorded> not = List.of(Bench.recorded(Bench.reading(plain, "1", 0.45, 5)));
    assertThat(drifts.corrected(not)).isSameAs(not);
    List<Recorded> asked = List.of(Bench.recorded(Bench.reading(corrected(plain), "1", 0.45, 5)));
    Signal signal = drifts.corrected(asked).get(0).reading().signal();
    assertThat(((Signal.Value) signal).value()).isCloseTo(0.5, within(1e-12));
    assertThat(signal.text()).isEqualTo("0.45");
  }

  /** A mean is corrected with its spread, which keeps its share of the mean. */
  @Test
  void theSpreadOfAMeanIsCorrectedWithIt() {
    Drifts drifts =
        new Drifts(
            List.of(check(Bench.START, 1.0, 1), check(Bench.START.plusSeconds(600), 0.8, 2)));
    Reading read = Bench.reading(corrected(Bench.madeUp(1)), "1", 0.45, 5);
    Signal mean =
        new Signal.Value(0.45, "0.45", OptionalDouble.empty(), Optional.of(new Spread(0.009, 3)));
    Reading ofMean =
        new Reading(
            read.subject(),
            read.batch(),
            read.flask(),
            read.flaskMapped(),
            read.replicate(),
            read.replicateMapped(),
            read.measuredAt(),
            mean,
            read.facts(),
            read.position());
    Signal signal = drifts.corrected(List.of(Bench.recorded(ofMean))).get(0).reading().signal();
    Spread spread = ((Signal.Value) signal).spread().orElseThrow();
    assertThat(spread.sd()).isCloseTo(0.01, within(1e-12));
    assertThat(spread.readings()).isEqualTo(3);
  }

  private static BatchReading check(Instant time, double signal, int row) {
    return new CheckReading(
        Bench.SUBJECT,
        new Batch("run1.csv", false),
        Optional.of(time),
        1,
        new Signal.Value(signal, Double.toString(signal)),
        ControlBench.position(row));
  }

  private static FlaskFacts corrected(FlaskFacts plain) {
    MethodFacts method = plain.method();
    Calculation asked =
        new Calculation(
            Calculation.Interval.OWN, Calculation.Weights.EQUAL, Calculation.Bend.SATURATION, true);
    return new FlaskFacts(
        plain.role(),
        plain.design(),
        plain.addition(),
        plain.aliquot(),
        plain.finalVolume(),
        plain.startVolume(),
        plain.preparation(),
        plain.blanks(),
        new MethodFacts(
            method.name(),
            method.resultUnit(),
            method.expectedFlasks(),
            method.fitReadings(),
            method.trustedSignal(),
            method.reportingLimit(),
            method.targetUncertainty(),
            method.workingRange(),
            method.bendAllowance(),
            method.blankDue(),
            asked,
            method.electrode()));
  }

  @Test
  void oneCheckAloneCorrectsNothing() {
    DriftCorrection one = DriftCorrection.of(List.of(ControlBench.check("CCV", 5, 0.5)));
    assertThat(one.isNone()).isTrue();
    assertThat(one.factorAt(ControlBench.time(0))).isEqualTo(1);
  }
}
