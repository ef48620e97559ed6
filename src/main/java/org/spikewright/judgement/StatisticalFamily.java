package org.spikewright.judgement;

import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.Set;
import org.spikewright.fit.BendTest;
import org.spikewright.fit.Lent;
import org.spikewright.fit.NoisyTest;
import org.spikewright.fit.OddFlask;
import org.spikewright.fit.SensitivitySpread.OddSlope;
import org.spikewright.fit.Slips;
import org.spikewright.fit.StraightLine;
import org.spikewright.reading.Calculation;
import org.spikewright.reading.Design;
import org.spikewright.series.Flask;

/**
 * The tests of one series whose false alarms are counted together. Each brings one probability,
 * already corrected for its own choices.
 *
 * @param bend whether the line bends
 * @param bendP its probability, one- or two-sided as the method asks
 * @param odd the oddest flask or level
 * @param noisy the scatter against the pool's
 * @param slips what slips of preparation would explain
 * @param oddSlope the sensitivity against the night's
 * @param significant those that stand by Holm's procedure
 */
record StatisticalFamily(
    Optional<BendTest> bend,
    OptionalDouble bendP,
    Optional<OddFlask> odd,
    Optional<NoisyTest> noisy,
    Optional<Slips> slips,
    Optional<OddSlope> oddSlope,
    Set<FlagKind> significant) {

  static StatisticalFamily of(SeriesResult result, Limit rate) {
    Optional<Borrowed> pool = result.borrowed();
    Optional<BendTest> bend = result.judgedBend();
    OptionalDouble bendP =
        bend.map(b -> OptionalDouble.of(b.p(side(result)))).orElseGet(OptionalDouble::empty);
    Optional<OddFlask> odd = result.judgedOdd();
    Optional<NoisyTest> noisy = pool.flatMap(p -> p.series().noisy());
    Optional<OddSlope> oddSlope = pool.flatMap(p -> p.series().oddSlope());
    Optional<Slips> slips = slips(result, oddSlope);
    Family family = new Family();
    bendP.ifPresent(p -> family.add(FlagKind.BENT, p));
    odd.ifPresent(o -> family.add(FlagKind.ODD_FLASK, o.p()));
    noisy.ifPresent(n -> family.add(FlagKind.NOISY, n.p()));
    slips.ifPresent(s -> family.add(FlagKind.SUSPECTED_SLIP, s.p()));
    oddSlope.ifPresent(s -> family.add(FlagKind.ODD_SLOPE, s.p()));
    return new StatisticalFamily(
        bend,
        bendP,
        odd,
        noisy,
        slips,
        oddSlope,
        rate.on() ? family.significant(rate.value()) : Set.of());
  }

  boolean stands(FlagKind kind) {
    return significant.contains(kind);
  }

  private static BendTest.Side side(SeriesResult result) {
    return result.series().method().calculation().bend() == Calculation.Bend.SATURATION
        ? BendTest.Side.SATURATION
        : BendTest.Side.EITHER;
  }

  private static Optional<Slips> slips(SeriesResult result, Optional<OddSlope> oddSlope) {
    double floor = Resolution.of(result.flasks());
    boolean vessel = result.series().design() == Design.ONE_VESSEL;
    List<Double> applied = new ArrayList<>();
    if (vessel) {
      result.flasks().stream().map(Flask::volumeFactor).forEach(applied::add);
      if (!applied.stream().allMatch(f -> f >= 1e-3 && f <= 1e3)) {
        return Optional.empty();
      }
    }
    StraightLine line = result.line();
    Slips.Lent lent = new Slips.Lent(0, 0, floor, Optional.empty());
    if (result.borrowed().isPresent()) {
      Lent pool = result.borrowed().get().lent();
      double[] factor = result.pooled().factor();
      double variance = pool.tested().variance() * pool.noise().scale(line, factor);
      line = pool.straightened(line, factor);
      lent = new Slips.Lent(pool.tested().df(), variance, floor, sensitivity(oddSlope));
    }
    return Slips.of(
        new Slips.Suspect(
            line, vessel ? Slips.Layout.ONE_VESSEL : Slips.Layout.FLASKS, applied, List.of()),
        lent);
  }

  private static Optional<Slips.Sensitivity> sensitivity(Optional<OddSlope> odd) {
    return odd.filter(o -> o.z() != 0 && Double.isFinite(Math.log(o.ratio()) / o.z()))
        .map(o -> new Slips.Sensitivity(Math.log(o.ratio()), Math.log(o.ratio()) / o.z(), o.df()));
  }
}
