package org.spikewright.series;

import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.within;

import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.Random;
import org.junit.jupiter.api.Test;
import org.spikewright.reading.Reading;
import org.spikewright.reading.Recorded;
import org.spikewright.reading.Signal;
import org.spikewright.reading.Spread;
import org.spikewright.testkit.Bench;

/** Flasks of which the export gives mean, standard deviation and number of readings. */
class SpreadTest {
  private static Recorded reading(int replicate, double signal, Optional<Spread> spread) {
    Reading plain = Bench.reading(Bench.madeUp(0), "" + replicate, signal, replicate);
    return Bench.recorded(
        new Reading(
            plain.subject(),
            plain.batch(),
            plain.flask(),
            plain.flaskMapped(),
            plain.replicate(),
            plain.replicateMapped(),
            plain.measuredAt(),
            new Signal.Value(signal, "x", OptionalDouble.empty(), spread),
            plain.facts(),
            plain.position()));
  }

  private static Flask flask(List<Recorded> readings) {
    List<Recorded> all = new ArrayList<>(readings);
    all.addAll(Bench.madeUpSeries(1, 2, 3).subList(1, 3));
    return Bench.series(all).flasks().stream().filter(Flask::isUnspiked).findFirst().orElseThrow();
  }

  @Test
  void a_mean_brings_its_spread_and_number_along() {
    Flask flask = flask(List.of(reading(1, 0.25, Optional.of(new Spread(0.01, 3)))));
    assertThat(flask.meanSignal()).isEqualTo(0.25);
    assertThat(flask.replicateSd()).isEqualTo(0.01);
    assertThat(flask.numbers()).isEqualTo(3);
  }

  /** Means of groups with their spreads give what the readings themselves give. */
  @Test
  void several_means_give_what_their_readings_would_have_given() {
    for (int seed = 0; seed < 50; seed++) {
      Random random = new Random(seed);
      List<Recorded> single = new ArrayList<>();
      List<Recorded> means = new ArrayList<>();
      for (int group = 0; group < 3; group++) {
        int n = 1 + random.nextInt(4);
        double[] signals = new double[n];
        double sum = 0;
        for (int i = 0; i < n; i++) {
          signals[i] = 1 + random.nextGaussian();
          sum += signals[i];
          single.add(reading(10 * group + i, signals[i], Optional.empty()));
        }
        double squares = 0;
        for (double signal : signals) {
          squares += Math.pow(signal - sum / n, 2);
        }
        Optional<Spread> spread =
            n == 1 ? Optional.empty() : Optional.of(new Spread(Math.sqrt(squares / (n - 1)), n));
        means.add(reading(group, sum / n, spread));
      }
      Flask truth = flask(single);
      Flask flask = flask(means);
      assertThat(flask.numbers()).as("seed " + seed).isEqualTo(truth.numbers());
      assertThat(flask.meanSignal())
          .as("seed " + seed)
          .isCloseTo(truth.meanSignal(), within(1e-12));
      assertThat(flask.replicateSd())
          .as("seed " + seed)
          .isCloseTo(truth.replicateSd(), within(1e-12));
    }
  }
}
