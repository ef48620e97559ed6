package org.spikewright.judgement;

import java.util.ArrayList;
import java.util.Comparator;
import java.util.EnumSet;
import java.util.List;
import java.util.Set;

/**
 * The statistical flags of one series, held together so that a perfect series raises any of them
 * with a stated probability.
 */
final class Family {
  private record Member(FlagKind kind, double p) {}

  private final List<Member> members = new ArrayList<>();

  /**
   * Adds a test.
   *
   * @param p its probability on a perfect series, already corrected for its own choices
   */
  void add(FlagKind kind, double p) {
    members.add(new Member(kind, Math.min(1, p)));
  }

  /**
   * The tests that stand at a family-wise rate. Source: Holm, Scand. J. Statist. 6 (1979) 65.
   *
   * @param rate above 0 and below 1
   */
  Set<FlagKind> significant(double rate) {
    List<Member> ordered = members.stream().sorted(Comparator.comparingDouble(Member::p)).toList();
    Set<FlagKind> significant = EnumSet.noneOf(FlagKind.class);
    for (int i = 0; i < ordered.size(); i++) {
      if (!(ordered.get(i).p() <= rate / (ordered.size() - i))) {
        break;
      }
      significant.add(ordered.get(i).kind());
    }
    return significant;
  }
}
