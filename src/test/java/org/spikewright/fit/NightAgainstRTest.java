package org.spikewright.fit;

import static org.assertj.core.api.Assertions.assertThat;

import java.util.Arrays;
import java.util.List;
import java.util.OptionalDouble;
import org.apache.commons.csv.CSVRecord;
import org.apache.commons.math3.distribution.FDistribution;
import org.assertj.core.api.SoftAssertions;
import org.assertj.core.data.Offset;
import org.junit.jupiter.api.Test;
import org.spikewright.reference.ReferenceTable;

/** Weighted lines, Fisher's F, the bend allowance and the priors of variances against R. */
class NightAgainstRTest {
  private static final List<CSVRecord> BY_R = ReferenceTable.rows("fit-night.csv");
  private static final double[] X = {0, 0.5, 1.25, 2, 3.5};
  private static final double[] Y = {1.02, 1.49, 2.31, 2.96, 4.61};
  private static final double[] WEIGHTS = {4, 2.5, 1.5, 1, 0.4};

  private static double byR(String quantity, int a) {
    return BY_R.stream()
        .filter(row -> row.get("quantity").equals(quantity))
        .filter(row -> ReferenceTable.number(row, "a") == a)
        .mapToDouble(row -> ReferenceTable.number(row, "value"))
        .findFirst()
        .orElseThrow();
  }

  private static void same(SoftAssertions soft, String quantity, int a, double ours) {
    double expected = byR(quantity, a);
    soft.assertThat(ours)
        .as("%s %s", quantity, a)
        .isCloseTo(expected, Offset.offset(1e-10 * Math.max(1, Math.abs(expected))));
  }

  @Test
  void a_weighted_line_and_all_that_rests_on_it_agree_to_ten_digits() {
    StraightLine line = (StraightLine) StraightLine.fit(X, Y, WEIGHTS);
    NativeEstimate estimate = NativeEstimate.of(line).orElseThrow();
    QuadraticFit curve = QuadraticFit.of(line).orElseThrow();
    SoftAssertions soft = new SoftAssertions();
    same(soft, "w_intercept", 0, line.signalIntercept());
    same(soft, "w_slope", 0, line.slope());
    same(soft, "w_s", 0, line.residualSd().orElseThrow());
    same(soft, "w_se_intercept", 0, line.interceptStandardError().orElseThrow());
    same(soft, "w_se_slope", 0, line.slopeStandardError().orElseThrow());
    same(soft, "w_cov", 0, line.covariance().orElseThrow());
    same(soft, "w_se_native", 0, estimate.standardError().orElseThrow());
    same(soft, "w_lower", 0, estimate.lower95().orElseThrow());
    same(soft, "w_upper", 0, estimate.upper95().orElseThrow());
    for (int i = 0; i < X.length; i++) {
      same(soft, "w_leverage", i + 1, line.leverage(i));
      same(soft, "w_rstudent", i + 1, DeletedResidual.of(line, i, 0).orElseThrow().t());
    }
    same(soft, "w_c2", 0, curve.c2());
    same(soft, "w_se_c2", 0, curve.c2StandardError().orElseThrow());
    same(soft, "w_p_bend", 0, BendTest.of(line).orElseThrow().pTwoSided());
    soft.assertAll();
  }

  @Test
  void the_bend_allowance_is_what_a_fit_with_the_bend_held_at_its_bound_gives() {
    StraightLine line = (StraightLine) StraightLine.fit(X, Y);
    QuadraticFit curve = QuadraticFit.of(line).orElseThrow();
    Variance own = new Variance(curve.residualSumOfSquares() / 2, 2);
    BendAllowance allowance = BendAllowance.of(line, own).orElseThrow();
    assertThat(allowance.bias().orElseThrow()).isCloseTo(byR("allowance", 0), Offset.offset(1e-10));
    double more = BendAllowance.of(line, new Variance(1, 2)).orElseThrow().bias().orElseThrow();
    assertThat(more).isGreaterThan(allowance.bias().orElseThrow());
  }

  @Test
  void an_allowance_whose_bent_line_never_reaches_zero_is_not_bounded() {
    double[] low = Arrays.stream(Y).map(y -> y - 100).toArray();
    StraightLine line = (StraightLine) StraightLine.fit(X, low);
    BendAllowance allowance = BendAllowance.of(line, new Variance(1, 2)).orElseThrow();
    assertThat(allowance.isBounded()).isFalse();
    assertThat(allowance.bias()).isEqualTo(OptionalDouble.empty());
  }

  @Test
  void fishers_tail_agrees_from_small_to_infinite_degrees_of_freedom() {
    SoftAssertions soft = new SoftAssertions();
    int rows = 0;
    for (CSVRecord row : BY_R) {
      if (row.get("quantity").equals("pf")) {
        rows++;
        double expected = ReferenceTable.number(row, "value");
        double ours =
            FisherF.upper(
                ReferenceTable.number(row, "a"),
                ReferenceTable.number(row, "b"),
                ReferenceTable.number(row, "c"));
        soft.assertThat(Math.abs(ours - expected))
            .as("%s: ours %s", row, ours)
            .isLessThanOrEqualTo(1e-9 * expected + 1e-300);
      }
    }
    soft.assertThat(rows).isEqualTo(90);
    soft.assertAll();
  }

  /**
   * The very variances that R's script makes. Ours allows for two bad series in a hundred and
   * averages over d_0, so that it need not agree to more than some percent.
   */
  @Test
  void the_prior_of_two_thousand_clean_variances_is_that_of_moments_and_of_likelihood() {
    SoftAssertions soft = new SoftAssertions();
    for (int d0 : new int[] {3, 6, 12}) {
      for (int nu : new int[] {1, 2, 4}) {
        double[] variances = new double[2000];
        int[] df = new int[2000];
        FDistribution f = new FDistribution(null, nu, d0);
        for (int i = 0; i < variances.length; i++) {
          variances[i] = 0.7 * f.inverseCumulativeProbability((i + 0.5) / variances.length);
          df[i] = nu;
        }
        VariancePrior prior = VariancePrior.of(variances, df).orElseThrow();
        for (String way : new String[] {"moments", "likelihood"}) {
          double d0OfR = prior(way + "_d0", d0, nu);
          double s02OfR = prior(way + "_s02", d0, nu);
          String seen = way + " d0 " + d0 + " nu " + nu + ": " + prior;
          soft.assertThat(1 / prior.df()).as(seen).isCloseTo(1 / d0OfR, Offset.offset(0.04));
          soft.assertThat(prior.variance() / s02OfR).as(seen).isBetween(0.95, 1.05);
        }
      }
    }
    soft.assertAll();
  }

  private static double prior(String quantity, int d0, int nu) {
    return BY_R.stream()
        .filter(row -> row.get("quantity").equals(quantity))
        .filter(row -> ReferenceTable.number(row, "a") == d0)
        .filter(row -> ReferenceTable.number(row, "b") == nu)
        .mapToDouble(row -> ReferenceTable.number(row, "value"))
        .findFirst()
        .orElseThrow();
  }
}
