package org.spikewright.summary;

import java.util.List;
import java.util.Locale;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.function.Function;
import org.spikewright.fit.BendAllowance;
import org.spikewright.fit.BendTest;
import org.spikewright.fit.Budget;
import org.spikewright.fit.DriftExposure;
import org.spikewright.judgement.Borrowed;
import org.spikewright.judgement.SeriesResult;

/**
 * What a result rests on beside its own line.
 *
 * @param pool whose series lend; empty where none do
 * @param poolSeries how many; 0 where none do
 * @param poolStandardError moderated standard error of the result from the fit, in its unit
 * @param poolLower95 lower end of the moderated interval; empty when unbounded
 * @param poolUpper95 upper end likewise
 * @param poolDf degrees of freedom of the moderated variance; empty where unbounded or none
 * @param bendP probability of the bend test that judges, one-sided towards saturation
 * @param bentValue the result from the bent line
 * @param bendAllowance largest bias that a bend may have and the data cannot exclude
 * @param driftExposure change of the result for 1 % drift, as a share of it
 * @param effectiveDf degrees of freedom of the combined uncertainty; empty where infinite or none
 * @param contributions to the combined uncertainty, the largest first: {@code fit 83 %}
 */
public record RowEvidence(
    String pool,
    int poolSeries,
    OptionalDouble poolStandardError,
    OptionalDouble poolLower95,
    OptionalDouble poolUpper95,
    OptionalDouble poolDf,
    OptionalDouble bendP,
    OptionalDouble bentValue,
    OptionalDouble bendAllowance,
    OptionalDouble driftExposure,
    OptionalDouble effectiveDf,
    List<String> contributions) {

  private static final int CONTRIBUTIONS = 3;

  private static final OptionalDouble NONE = OptionalDouble.empty();

  /** Of readings that gave no result. */
  public static final RowEvidence EMPTY =
      new RowEvidence("", 0, NONE, NONE, NONE, NONE, NONE, NONE, NONE, NONE, NONE, List.of());

  static RowEvidence of(SeriesResult result) {
    Optional<Borrowed> pool = result.borrowed();
    Optional<BendTest> bend = result.judgedBend();
    OptionalDouble bentAxis = number(bend, BendTest::nativeConcentration);
    OptionalDouble allowed = number(result.allowance(), BendAllowance::bias);
    return new RowEvidence(
        pool.map(Borrowed::lender).orElse(""),
        pool.map(p -> p.lent().series()).orElse(0),
        number(pool, Borrowed::standardError),
        number(pool, Borrowed::lower95),
        number(pool, Borrowed::upper95),
        number(pool, p -> OptionalDouble.of(p.series().variance().df())),
        number(bend, b -> OptionalDouble.of(b.pOneSided())),
        onScale(bentAxis, result.series().toResult()::value),
        onScale(allowed, result.series().toResult()::length),
        FlaskLine.finite(
            DriftExposure.of(result.line(), result.pooled().minutes()).orElse(Double.NaN)),
        number(result.budget(), b -> OptionalDouble.of(b.df())),
        result.budget().map(RowEvidence::largest).orElse(List.of()));
  }

  private static List<String> largest(Budget budget) {
    return budget.shares().stream()
        .limit(CONTRIBUTIONS)
        .map(
            share ->
                share.contribution().name()
                    + String.format(Locale.ROOT, " %.0f %%", share.percent()))
        .toList();
  }

  private static OptionalDouble onScale(OptionalDouble axis, Function<Double, Double> scale) {
    return axis.isPresent() ? FlaskLine.finite(scale.apply(axis.getAsDouble())) : axis;
  }

  private static <T> OptionalDouble number(Optional<T> source, Function<T, OptionalDouble> part) {
    OptionalDouble value = source.map(part).orElse(NONE);
    return value.isPresent() ? FlaskLine.finite(value.getAsDouble() + 0.0) : value;
  }
}
