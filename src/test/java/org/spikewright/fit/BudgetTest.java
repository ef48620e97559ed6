package org.spikewright.fit;

import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.assertThatIllegalArgumentException;
import static org.assertj.core.api.Assertions.within;

import java.util.List;
import java.util.Map;
import java.util.Optional;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;

class BudgetTest {
  private static final double KNOWN = Double.POSITIVE_INFINITY;

  private static Contribution part(String name, double effect, double df) {
    return Contribution.absolute(name, name, effect, df);
  }

  private static Budget budget(Contribution fit, Contribution... others) {
    return Budget.of(Optional.of(fit), List.of(others)).orElseThrow();
  }

  @Test
  void parts_that_stand_alone_add_in_quadrature_and_those_of_one_error_linearly() {
    Budget budget =
        budget(
            part("fit", 3, 4),
            part("a", 1, KNOWN).in("pipette"),
            part("b", 3, KNOWN).in("pipette"),
            part("c", 12, KNOWN));
    assertThat(budget.standardUncertainty()).isCloseTo(13, within(1e-12));
    // (13/3)^4 times 4
    assertThat(budget.df()).isCloseTo(4 * Math.pow(13.0 / 3, 4), within(1e-9));
  }

  @Test
  void one_error_that_acts_both_ways_cancels() {
    Budget budget =
        budget(part("fit", 1, 4), part("a", 5, 9).in("pipette"), part("b", -5, 9).in("pipette"));
    assertThat(budget.standardUncertainty()).isCloseTo(1, within(1e-12));
    assertThat(budget.shares().stream().mapToDouble(Budget.Share::percent).sum())
        .isCloseTo(100, within(1e-9));
  }

  @Test
  void shares_are_of_the_variance_and_the_largest_comes_first() {
    Budget budget =
        budget(
            part("fit", 1, 4),
            part("a", 1, KNOWN).in("pipette"),
            part("b", 2, KNOWN).in("pipette"),
            part("c", -4, KNOWN));
    assertThat(budget.shares())
        .extracting(share -> share.contribution().name())
        .containsExactly("c", "b", "a", "fit");
    assertThat(budget.shares().get(0).percent()).isCloseTo(100 * 16.0 / 26, within(1e-9));
    assertThat(budget.shares().get(1).percent()).isCloseTo(100 * 6.0 / 26, within(1e-9));
    assertThat(budget.shares().get(3).percent()).isCloseTo(100 / 26.0, within(1e-9));
  }

  /** With 2 degrees of freedom Welch-Satterthwaite promises less for the whole than for the fit. */
  @ParameterizedTest
  @ValueSource(doubles = {0.1, 0.5, 1, 2, 10})
  void the_expanded_uncertainty_is_never_less_than_that_of_the_fit_alone(double other) {
    Budget budget = budget(part("fit", 1, 2), part("stock", other, KNOWN));
    double alone = StudentT.quantile(0.975, 2);
    double whole = StudentT.quantile(0.975, budget.df()) * budget.standardUncertainty();
    assertThat(budget.expandedUncertainty()).isEqualTo(Math.max(alone, whole));
    assertThat(budget.coverageFactor())
        .isEqualTo(budget.expandedUncertainty() / budget.standardUncertainty());
    assertThat(other < 1.5 ? whole : alone)
        .as("which one counts")
        .isLessThan(other < 1.5 ? alone : whole);
  }

  @Test
  void the_cheapest_improvement_halves_what_lowers_u_most_and_a_pipette_as_a_whole() {
    Budget budget =
        budget(
            part("fit", 1, 20),
            part("a", 1, KNOWN).in("pipette"),
            part("b", 1, KNOWN).in("pipette"),
            part("c", 1.5, KNOWN));
    Budget.Improvement improvement = budget.cheapestImprovement().orElseThrow();
    assertThat(improvement.names()).containsExactly("a", "b");
    Budget then =
        budget(
            part("fit", 1, 20),
            part("a", 0.5, KNOWN).in("pipette"),
            part("b", 0.5, KNOWN).in("pipette"),
            part("c", 1.5, KNOWN));
    assertThat(improvement.expandedUncertainty()).isEqualTo(then.expandedUncertainty());
    assertThat(improvement.expandedUncertainty()).isLessThan(budget.expandedUncertainty());
  }

  @Test
  void nothing_contributed_is_no_uncertainty_and_nothing_to_improve() {
    Budget budget = Budget.of(Optional.empty(), List.of()).orElseThrow();
    assertThat(budget.standardUncertainty()).isZero();
    assertThat(budget.expandedUncertainty()).isZero();
    assertThat(budget.df()).isEqualTo(KNOWN);
    assertThat(budget.coverageFactor()).isCloseTo(1.959963984540054, within(1e-12));
    assertThat(budget.shares()).isEmpty();
    assertThat(budget.cheapestImprovement()).isEmpty();
  }

  @Test
  void what_no_number_holds_has_no_budget() {
    assertThat(Budget.of(Optional.empty(), List.of(part("a", 1e308, 1), part("b", 1.7e308, 1))))
        .isEmpty();
  }

  @Test
  void a_tolerance_is_the_standard_uncertainty_of_its_shape() {
    assertThat(Tolerance.rectangular(3).standardUncertainty()).isCloseTo(1.7320508, within(1e-7));
    assertThat(Tolerance.triangular(6).standardUncertainty()).isCloseTo(2.4494897, within(1e-7));
    assertThat(Tolerance.standard(0.2).standardUncertainty()).isEqualTo(0.2);
    assertThat(Tolerance.expanded(0.5, 2).standardUncertainty()).isEqualTo(0.25);
  }

  @Test
  void broken_promises_are_refused() {
    assertThatIllegalArgumentException().isThrownBy(() -> part("a", Double.NaN, 1));
    assertThatIllegalArgumentException().isThrownBy(() -> part("a", 1, 0));
    assertThatIllegalArgumentException().isThrownBy(() -> Tolerance.rectangular(-1));
    assertThatIllegalArgumentException().isThrownBy(() -> Tolerance.expanded(1, 0));
    assertThatIllegalArgumentException().isThrownBy(() -> Preparation.Part.known(Double.NaN));
    assertThatIllegalArgumentException()
        .isThrownBy(() -> new Preparation(Map.of(), 0.5, 0, 1, Optional.empty()));
  }
}
