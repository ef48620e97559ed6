package org.spikewright.analysis;

import java.util.Comparator;

/**
 * Under what the history of a control is kept.
 *
 * @param name of the control
 * @param kind what it is
 * @param instrument on which it was measured
 * @param analyte the analyte
 * @param line its line; empty when none is mapped
 */
public record ControlKey(
    String name, ControlRule.Kind kind, String instrument, String analyte, String line)
    implements Comparable<ControlKey> {

  private static final Comparator<ControlKey> ORDER =
      Comparator.comparing(ControlKey::kind)
          .thenComparing(ControlKey::name)
          .thenComparing(ControlKey::analyte)
          .thenComparing(ControlKey::line)
          .thenComparing(ControlKey::instrument);

  @Override
  public int compareTo(ControlKey other) {
    return ORDER.compare(this, other);
  }
}
