package org.spikewright.ledger;

import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.assertThatThrownBy;

import java.util.ArrayList;
import java.util.List;
import java.util.OptionalDouble;
import java.util.Random;
import org.junit.jupiter.api.Test;
import org.spikewright.fit.PoolEvidence;
import org.spikewright.fit.PooledSeries;

class PoolStoreTest {

  private static List<PooledSeries> series(long seed, int n) {
    Random random = new Random(seed);
    List<PooledSeries> series = new ArrayList<>();
    for (int j = 0; j < n; j++) {
      double[] x = {0, 1, 2, 3, 4};
      double[] y = new double[5];
      double[] ones = new double[5];
      double[] variance = new double[5];
      double[] minutes = new double[5];
      for (int i = 0; i < 5; i++) {
        y[i] = (2 + x[i]) * (1 + 0.01 * random.nextGaussian());
        ones[i] = 1;
        variance[i] = i == 2 ? Double.NaN : 1e-4 * random.nextDouble();
        minutes[i] = 600 + 5 * j + random.nextInt(4) + i / 10.0;
      }
      series.add(
          new PooledSeries(
              x,
              x,
              y,
              ones,
              new int[] {3, 3, 1, 3, 3},
              variance,
              minutes,
              j % 7 == 0 ? OptionalDouble.empty() : OptionalDouble.of(1 + 0.01 * j)));
    }
    return series;
  }

  @Test
  void evidenceReadsBackToTheBit() {
    for (long seed = 1; seed <= 40; seed++) {
      PoolEvidence evidence = PoolEvidence.of(series(seed, 3 + (int) seed), series(-seed, 8));
      String text = RecordText.encode(evidence);
      PoolEvidence back = RecordText.decode(PoolEvidence.class, text);
      assertThat(back).as("seed %d", seed).isEqualTo(evidence);
      assertThat(RecordText.encode(back)).as("seed %d", seed).isEqualTo(text);
    }
  }

  @Test
  void rememberedSeriesLendTheSameEvidence() {
    List<PooledSeries> before = series(11, 12);
    PoolStore.Series kept = new PoolStore.Series(before);
    List<PooledSeries> back =
        RecordText.decode(PoolStore.Series.class, RecordText.encode(kept)).series();
    assertThat(back).hasSize(12);
    assertThat(PoolEvidence.of(series(12, 5), back))
        .isEqualTo(PoolEvidence.of(series(12, 5), before));
  }

  @Test
  void theTextOfAnotherRecordIsRefused() {
    String text = RecordText.encode(new PoolStore.Series(series(1, 2)));
    assertThatThrownBy(() -> RecordText.decode(PoolEvidence.class, text))
        .isInstanceOf(RuntimeException.class);
  }
}
