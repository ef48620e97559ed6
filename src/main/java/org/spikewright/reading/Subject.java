package org.spikewright.reading;

import java.util.Comparator;

/**
 * Whose signal a reading is: what all readings of a series share before batch, time and preparation
 * divide them.
 *
 * @param instrument the instrument's name, by default the mapping's name
 * @param sample the sample
 * @param analyte the analyte
 * @param line the line, mass or potential at which it was read; empty when none is mapped
 */
public record Subject(String instrument, SampleId sample, String analyte, String line)
    implements Comparable<Subject> {

  private static final Comparator<Subject> ORDER =
      Comparator.comparing(Subject::instrument)
          .thenComparing(Subject::sample)
          .thenComparing(Subject::analyte)
          .thenComparing(Subject::line);

  /** The fixed order in which every sum over series runs. */
  @Override
  public int compareTo(Subject other) {
    return ORDER.compare(this, other);
  }
}
