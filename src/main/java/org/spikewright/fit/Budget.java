package org.spikewright.fit;

import java.util.ArrayList;
import java.util.Comparator;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;

/**
 * The uncertainty budget of one result, in the result's unit. Contributions of one group are summed
 * with their signs, groups and single contributions in quadrature.
 *
 * <p>The expanded uncertainty is t·u with the effective degrees of freedom, and never less than
 * that of the fit alone: at 2 or 3 degrees of freedom the Welch-Satterthwaite formula can promise
 * less for the whole than for its largest part.
 *
 * <p>Source: JCGM 100:2008 (GUM), 5.1.2 and 5.2.2 note 1 (combination), G.4 (effective degrees of
 * freedom, used as they are and not rounded down); Eurachem/CITAC CG 4 (2012), 8.2.
 *
 * @param fit what the scatter about the line brings; empty when the line has none of its own (two
 *     flasks), and then the budget is less than the whole
 * @param others all further contributions
 * @param standardUncertainty combined, 0 or more
 * @param df effective degrees of freedom, above 0, infinite when all are
 * @param expandedUncertainty for 95 %
 */
public record Budget(
    Optional<Contribution> fit,
    List<Contribution> others,
    double standardUncertainty,
    double df,
    double expandedUncertainty) {

  private static final double COVERAGE = 0.975;

  /**
   * A contribution's part in the variance of the result.
   *
   * @param percent of the variance; all of a budget make 100. Within a group a contribution that
   *     cancels others has less than 0
   */
  public record Share(Contribution contribution, double percent) {}

  /**
   * What halving one input's uncertainty would bring.
   *
   * @param names of the contributions that halve together, one error's all
   * @param what of the first of them
   * @param expandedUncertainty of the result then
   */
  public record Improvement(List<String> names, String what, double expandedUncertainty) {}

  /**
   * The budget of these contributions.
   *
   * @return empty when a number is too large to compute with
   */
  public static Optional<Budget> of(Optional<Contribution> fit, List<Contribution> others) {
    List<Contribution> all = new ArrayList<>(others);
    fit.ifPresent(all::add);
    List<Contribution> errors = independent(all);
    double u = 0;
    for (Contribution error : errors) {
      u = Math.hypot(u, error.effect());
    }
    double reciprocal = 0;
    for (Contribution error : errors) {
      double part = u > 0 ? error.effect() / u : 0;
      reciprocal += part * part * part * part / error.df();
    }
    double df = 1 / reciprocal;
    double alone =
        fit.map(f -> StudentT.quantile(COVERAGE, f.df()) * f.standardUncertainty()).orElse(0.0);
    double expanded = Math.max(StudentT.quantile(COVERAGE, df) * u, alone);
    return Double.isFinite(expanded)
        ? Optional.of(new Budget(fit, List.copyOf(others), u, df, expanded))
        : Optional.empty();
  }

  /** One contribution for each error: a group's members summed, with the fewest df among them. */
  private static List<Contribution> independent(List<Contribution> all) {
    Map<String, Contribution> groups = new LinkedHashMap<>();
    List<Contribution> errors = new ArrayList<>();
    for (Contribution one : all) {
      if (one.group().isEmpty()) {
        errors.add(one);
      } else {
        groups.merge(one.group().get(), one, Budget::sum);
      }
    }
    errors.addAll(groups.values());
    return errors;
  }

  private static Contribution sum(Contribution a, Contribution b) {
    double df = Math.min(a.df(), b.df());
    return new Contribution(a.name(), a.what(), a.effect() + b.effect(), df, a.group());
  }

  /** The coverage factor to print, U/u; Student's t when there is no uncertainty at all. */
  public double coverageFactor() {
    return standardUncertainty > 0
        ? expandedUncertainty / standardUncertainty
        : StudentT.quantile(COVERAGE, df);
  }

  /** Each contribution's part in the variance, the largest first; none without uncertainty. */
  public List<Share> shares() {
    if (!(standardUncertainty > 0)) {
      return List.of();
    }
    List<Share> shares = new ArrayList<>();
    for (Contribution one : all()) {
      double whole =
          one.group().isEmpty()
              ? one.effect()
              : all().stream()
                  .filter(other -> other.group().equals(one.group()))
                  .mapToDouble(Contribution::effect)
                  .sum();
      double part = one.effect() / standardUncertainty * (whole / standardUncertainty);
      shares.add(new Share(one, 100 * part));
    }
    shares.sort(Comparator.comparingDouble(Share::percent).reversed());
    return List.copyOf(shares);
  }

  /** The one error whose halving makes U smallest; empty where halving brings nothing. */
  public Optional<Improvement> cheapestImprovement() {
    Optional<Improvement> best = Optional.empty();
    for (Contribution one : all()) {
      Optional<Improvement> halved = halved(one);
      double least = best.map(Improvement::expandedUncertainty).orElse(expandedUncertainty);
      if (halved.isPresent() && halved.get().expandedUncertainty() < least) {
        best = halved;
      }
    }
    return best;
  }

  private Optional<Improvement> halved(Contribution one) {
    List<String> names =
        all().stream().filter(other -> together(one, other)).map(Contribution::name).toList();
    return of(
            fit.map(f -> together(one, f) ? f.times(0.5) : f),
            others.stream().map(other -> together(one, other) ? other.times(0.5) : other).toList())
        .map(budget -> new Improvement(names, one.what(), budget.expandedUncertainty));
  }

  private static boolean together(Contribution one, Contribution other) {
    return one.equals(other) || one.group().isPresent() && one.group().equals(other.group());
  }

  private List<Contribution> all() {
    List<Contribution> all = new ArrayList<>();
    fit.ifPresent(all::add);
    all.addAll(others);
    return all;
  }
}
