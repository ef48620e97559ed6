package org.spikewright.fit;

import java.util.ArrayList;
import java.util.Comparator;
import java.util.EnumSet;
import java.util.List;
import java.util.Set;

/** The family of one series' tests under Holm at 2 %, as the judgement uses them. */
final class FamilyOfTests {
  static final double RATE = 0.02;

  /** A bend that moves the result by less is no flag. */
  static final double LEAST_CONSEQUENCE = 0.05;

  enum Member {
    BENT,
    ODD_FLASK,
    NOISY,
    ODD_SLOPE
  }

  private record Probability(Member member, double p) {}

  private FamilyOfTests() {}

  /** The members that Holm finds significant, whatever the bend's consequence. */
  static Set<Member> significant(ModeratedSeries series) {
    List<Probability> all = new ArrayList<>();
    series.bend().ifPresent(b -> all.add(new Probability(Member.BENT, b.pOneSided())));
    series.odd().ifPresent(o -> all.add(new Probability(Member.ODD_FLASK, o.p())));
    series.noisy().ifPresent(n -> all.add(new Probability(Member.NOISY, n.p())));
    series.oddSlope().ifPresent(s -> all.add(new Probability(Member.ODD_SLOPE, s.p())));
    all.sort(Comparator.comparingDouble(Probability::p));
    Set<Member> significant = EnumSet.noneOf(Member.class);
    for (int i = 0; i < all.size(); i++) {
      if (all.get(i).p() * (all.size() - i) > RATE) {
        break;
      }
      significant.add(all.get(i).member());
    }
    return significant;
  }

  /** The flags: as above, a bend only with a consequence. */
  static Set<Member> flags(ModeratedSeries series) {
    Set<Member> flags = significant(series);
    double straight = series.line().signalIntercept() / series.line().slope();
    double bent =
        series.bend().map(BendTest::nativeConcentration).map(c -> c.orElse(0)).orElse(straight);
    if (!(Math.abs(bent / straight - 1) > LEAST_CONSEQUENCE)) {
      flags.remove(Member.BENT);
    }
    return flags;
  }
}
