package org.spikewright.analysis;

import java.util.Comparator;
import org.spikewright.reading.Design;
import org.spikewright.reading.Subject;
import org.spikewright.series.AdditionSeries;

/**
 * What series must share to lend each other their noise.
 *
 * @param instrument the instrument
 * @param analyte the analyte
 * @param line the line, mass or potential; empty when none is mapped
 * @param design how the additions were made
 */
public record PoolKey(String instrument, String analyte, String line, Design design)
    implements Comparable<PoolKey> {

  private static final Comparator<PoolKey> ORDER =
      Comparator.comparing(PoolKey::instrument)
          .thenComparing(PoolKey::analyte)
          .thenComparing(PoolKey::line)
          .thenComparing(PoolKey::design);

  /** The pool of a series. */
  public static PoolKey of(AdditionSeries series) {
    Subject subject = series.key().subject();
    return new PoolKey(subject.instrument(), subject.analyte(), subject.line(), series.design());
  }

  /** As people read it. */
  public String shown() {
    return instrument + ", " + analyte + (line.isEmpty() ? "" : " " + line) + ", " + design.word();
  }

  @Override
  public int compareTo(PoolKey other) {
    return ORDER.compare(this, other);
  }
}
