package org.spikewright.fit;

import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.assertThatIllegalArgumentException;
import static org.assertj.core.api.Assertions.within;

import java.util.ArrayList;
import java.util.List;
import java.util.Locale;
import java.util.OptionalDouble;
import java.util.SplittableRandom;
import org.apache.commons.math3.distribution.BinomialDistribution;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.spikewright.fit.KnownAdditions.Fitted;
import org.spikewright.fit.KnownAdditions.Reading;
import org.spikewright.fit.KnownAdditions.Refused;
import org.spikewright.fit.KnownAdditions.Vessel;

class KnownAdditionsTest {
  private static final OptionalDouble NONE = OptionalDouble.empty();

  private static Vessel vessel(int charge) {
    return new Vessel(25, 50, charge, OptionalDouble.of(298.15), NONE);
  }

  /** Readings of a vessel with 25 mL of sample in 50 mL, additions of amount 10 in 0.5 mL. */
  private static List<Reading> readings(
      double c, double e0, double slope, int n, double noise, SplittableRandom random) {
    List<Reading> readings = new ArrayList<>();
    for (int i = 0; i < n; i++) {
      double decades = Math.log10((c * 25 + 10.0 * i) / (50 + 0.5 * i));
      double e = e0 + slope * decades + noise * random.nextGaussian();
      readings.add(new Reading(10.0 * i, 0.5 * i, e));
    }
    return readings;
  }

  private static Fitted fitted(Vessel vessel, List<Reading> readings) {
    assertThat(KnownAdditions.fit(vessel, readings)).isInstanceOf(Fitted.class);
    return (Fitted) KnownAdditions.fit(vessel, readings);
  }

  @ParameterizedTest
  @CsvSource({
    "0.4, 120, -58.2, -1, 5",
    "0.05, -30, -55, -1, 4",
    "3, 250, 28.9, 2, 6",
    "20, 80, 59, 1, 8",
    "0.4, 120, -27, -2, 12",
    "0.2, 0, 40, 1, 5"
  })
  void exact_potentials_give_back_what_made_them(
      double c, double e0, double slope, int charge, int n) {
    Fitted fitted = fitted(vessel(charge), readings(c, e0, slope, n, 0, new SplittableRandom(1)));
    assertThat(fitted.nativeConcentration()).isCloseTo(c, within(1e-8 * c));
    assertThat(fitted.slope()).isCloseTo(slope, within(1e-7));
    assertThat(fitted.standardPotential()).isCloseTo(e0, within(1e-6));
    assertThat(fitted.df()).isEqualTo(n - 3);
    assertThat(fitted.standardError().orElseThrow()).isLessThan(1e-8 * c);
    assertThat(fitted.bySlope()).isEmpty();
    double theory = 59.1596 / charge;
    assertThat(fitted.theoreticalSlope().orElseThrow()).isCloseTo(theory, within(1e-3));
    assertThat(fitted.slopeToTheory().orElseThrow()).isCloseTo(slope / theory, within(1e-4));
  }

  /**
   * Calcium in sea water, diluted tenfold; the data are remembered from Harvey, Analytical
   * Chemistry 2.1, ch. 11 (no print is claimed), the value is 9.87671821041316e-3 by 50 digits.
   */
  @Test
  void a_single_addition_with_a_measured_slope_is_the_closed_form() {
    Vessel vessel = new Vessel(50, 50, 2, NONE, OptionalDouble.of(29.58));
    Fitted fitted = fitted(vessel, List.of(new Reading(0, 0, -52.9), new Reading(0.05, 1, -44.17)));
    assertThat(10 * fitted.nativeConcentration()).isCloseTo(9.87671821041316e-3, within(1e-13));
    assertThat(fitted.standardError()).isEmpty();
    assertThat(fitted.lower95()).isEmpty();
    assertThat(fitted.slopeStandardError()).isEmpty();
    assertThat(fitted.theoreticalSlope()).isEmpty();
    assertThat(fitted.slopeToTheory()).isEmpty();
  }

  @Test
  void the_sensitivity_to_a_measured_slope_is_that_of_the_fit_done_again() {
    List<Reading> readings = readings(0.4, 120, -58, 3, 0, new SplittableRandom(1));
    double[] c = new double[2];
    for (int side = 0; side < 2; side++) {
      double slope = -58 + (side == 0 ? -1e-3 : 1e-3);
      Vessel vessel = new Vessel(25, 50, -1, NONE, OptionalDouble.of(slope));
      c[side] = fitted(vessel, readings).nativeConcentration();
    }
    Vessel vessel = new Vessel(25, 50, -1, NONE, OptionalDouble.of(-58));
    double bySlope = fitted(vessel, readings).bySlope().orElseThrow();
    assertThat(bySlope).isCloseTo((c[1] - c[0]) / 2e-3, within(1e-4 * Math.abs(bySlope)));
    assertThat(Math.abs(bySlope)).isGreaterThan(1e-3);
  }

  @ParameterizedTest(name = "{0} readings")
  @CsvSource({"3", "4", "5", "8"})
  void the_profile_interval_holds_the_truth_as_often_as_95_percent_allows(int n) {
    SplittableRandom random = new SplittableRandom(20250115L + n);
    int series = 2_000;
    int holds = 0;
    for (int k = 0; k < series; k++) {
      double c = Math.pow(10, random.nextDouble(-0.7, 0.3));
      Vessel vessel = new Vessel(25, 50, -1, NONE, OptionalDouble.of(-58));
      Fitted fitted = fitted(vessel, readings(c, 100, -58, n, 0.15, random));
      boolean above = fitted.lower95().orElse(0) <= c;
      holds += above && c <= fitted.upper95().orElse(Double.MAX_VALUE) ? 1 : 0;
    }
    System.out.printf(Locale.ROOT, "%d readings: %.2f %%%n", n, 100.0 * holds / series);
    BinomialDistribution honest = new BinomialDistribution(null, series, 0.95);
    assertThat(holds)
        .isBetween(
            honest.inverseCumulativeProbability(0.0005),
            honest.inverseCumulativeProbability(0.9995));
  }

  @ParameterizedTest(name = "signals of {0}")
  @CsvSource({"1", "1000"})
  void another_unit_of_amount_and_another_zero_of_potential_change_the_value_alike(double unit) {
    List<Reading> given = readings(0.4, 120, -58, 5, 0.2, new SplittableRandom(5));
    List<Reading> other =
        given.stream()
            .map(r -> new Reading(r.amount() * unit, r.volume(), r.potential() + 77))
            .toList();
    Fitted one = fitted(vessel(-1), given);
    Fitted two = fitted(vessel(-1), other);
    double c = one.nativeConcentration() * unit;
    assertThat(two.nativeConcentration()).isCloseTo(c, within(1e-9 * c));
    assertThat(two.lower95().orElseThrow())
        .isCloseTo(one.lower95().orElseThrow() * unit, within(1e-7 * c));
    assertThat(two.slope()).isCloseTo(one.slope(), within(1e-7));
  }

  @Test
  void three_readings_without_a_measured_slope_are_refused_with_what_is_needed() {
    KnownAdditions outcome =
        KnownAdditions.fit(vessel(-1), readings(0.4, 120, -58, 3, 0, new SplittableRandom(1)));
    assertThat(((Refused) outcome).reason()).contains("found 3").contains("measured slope");
  }

  @Test
  void what_cannot_be_fitted_is_refused_in_words() {
    List<Reading> wrongWay = readings(0.4, 120, 58, 5, 0, new SplittableRandom(1));
    List<Reading> flat = readings(0.4, 120, 0, 5, 0, new SplittableRandom(1));
    List<Reading> same = List.of(new Reading(0, 0, 1), new Reading(0, 0, 2), new Reading(0, 0, 3));
    List<Reading> none = List.of(new Reading(0, 0, 1), new Reading(1, 1, Double.NaN));
    for (List<Reading> readings : List.of(wrongWay, flat, same, none, List.<Reading>of())) {
      assertThat(KnownAdditions.fit(vessel(-1), readings)).isInstanceOf(Refused.class);
    }
  }

  @Test
  void broken_promises_are_refused() {
    assertThatIllegalArgumentException().isThrownBy(() -> new Vessel(25, 20, 1, NONE, NONE));
    assertThatIllegalArgumentException().isThrownBy(() -> new Vessel(25, 25, 0, NONE, NONE));
    assertThatIllegalArgumentException()
        .isThrownBy(() -> new Vessel(25, 25, 1, OptionalDouble.of(0), NONE));
    assertThatIllegalArgumentException()
        .isThrownBy(() -> new Vessel(25, 25, 1, NONE, OptionalDouble.of(Double.NaN)));
  }
}
