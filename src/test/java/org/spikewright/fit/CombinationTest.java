package org.spikewright.fit;

import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.within;

import java.util.ArrayList;
import java.util.List;
import java.util.Locale;
import java.util.SplittableRandom;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.spikewright.quantity.Estimate;

class CombinationTest {
  @Test
  void known_uncertainties_give_the_textbook_mean_chi_square_and_both_uncertainties() {
    Combination both =
        Combination.of(List.of(Estimate.known(10, 1), Estimate.known(13, 2))).orElseThrow();
    assertThat(both.mean()).isCloseTo(10.6, within(1e-12));
    assertThat(both.internal().standardUncertainty()).isCloseTo(Math.sqrt(0.8), within(1e-12));
    // 3 apart with variance 1 + 4
    assertThat(both.chiSquare()).isCloseTo(9.0 / 5, within(1e-12));
    assertThat(both.p()).isCloseTo(0.17971249487899976, within(1e-9));
    assertThat(both.birgeRatio()).isCloseTo(Math.sqrt(1.8), within(1e-12));
    assertThat(both.external().standardUncertainty())
        .isCloseTo(Math.sqrt(0.8 * 1.8), within(1e-12));
    assertThat(both.external().degreesOfFreedom()).isEqualTo(1);
    assertThat(both.internal().degreesOfFreedom()).isEqualTo(Double.POSITIVE_INFINITY);
    assertThat(both.cautious()).isEqualTo(both.external());
  }

  /** Taken as chi-square, the sum of squares of few flasks alarms two to four times too often. */
  @ParameterizedTest(name = "{0} results, {1} df")
  @CsvSource({"2, 2, 0.06", "2, 4, 0.06", "3, 3, 0.08", "4, 3, 0.1", "3, 10, 0.06", "2, 30, 0.06"})
  void results_that_agree_are_called_apart_about_as_often_as_the_p_says(
      int n, int df, double most) {
    SplittableRandom random = new SplittableRandom(20250115L + 10 * n + df);
    int series = 20_000;
    int apart = 0;
    int byChiSquare = 0;
    double squares = 0;
    double promised = 0;
    for (int k = 0; k < series; k++) {
      List<Estimate> results = new ArrayList<>();
      for (int i = 0; i < n; i++) {
        results.add(drawn(random, 1 + 0.5 * i, df));
      }
      Combination combined = Combination.of(results).orElseThrow();
      apart += combined.p() <= 0.05 ? 1 : 0;
      byChiSquare += FisherF.chiSquareUpper(combined.chiSquare(), n - 1) <= 0.05 ? 1 : 0;
      squares += combined.mean() * combined.mean() / series;
      double u = combined.internal().standardUncertainty();
      promised += u * u / series;
    }
    double rate = (double) apart / series;
    System.out.printf(
        Locale.ROOT,
        "%d results with %d df: apart %.4f, by chi-square %.4f, variance promised/true %.3f%n",
        n,
        df,
        rate,
        (double) byChiSquare / series,
        promised / squares);
    assertThat(rate).isBetween(0.025, most);
    assertThat(byChiSquare).isGreaterThan(apart);
  }

  private static Estimate drawn(SplittableRandom random, double u, int df) {
    double chiSquare = 0;
    for (int i = 0; i < df; i++) {
      double z = random.nextGaussian();
      chiSquare += z * z;
    }
    return new Estimate(u * random.nextGaussian(), u * Math.sqrt(chiSquare / df), df);
  }

  @Test
  void an_offset_and_a_unit_change_the_mean_alike_and_the_p_not_at_all() {
    List<Estimate> given =
        List.of(new Estimate(3, 0.2, 4), new Estimate(3.6, 0.1, 2), new Estimate(3.1, 0.3, 8));
    List<Estimate> other =
        given.stream()
            .map(
                e ->
                    new Estimate(
                        1e6 + 1000 * e.value(),
                        1000 * e.standardUncertainty(),
                        e.degreesOfFreedom()))
            .toList();
    Combination one = Combination.of(given).orElseThrow();
    Combination two = Combination.of(other).orElseThrow();
    assertThat(two.mean()).isCloseTo(1e6 + 1000 * one.mean(), within(1e-6));
    assertThat(two.p()).isCloseTo(one.p(), within(1e-9));
  }

  @Test
  void one_result_or_one_without_uncertainty_is_not_combined() {
    assertThat(Combination.of(List.of())).isEmpty();
    assertThat(Combination.of(List.of(Estimate.known(1, 1)))).isEmpty();
    assertThat(Combination.of(List.of(Estimate.known(1, 1), Estimate.known(1, 0)))).isEmpty();
  }
}
