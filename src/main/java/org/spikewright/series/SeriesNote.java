package org.spikewright.series;

/**
 * Something that the gathering of a series has to say about it.
 *
 * @param kind what kind of remark it is
 * @param words a plain sentence with the numbers or names
 */
public record SeriesNote(Kind kind, String words) {

  /** Kinds of remark, each of which judgement turns into a flag. */
  public enum Kind {
    /** A later delivery replaced an earlier reading. */
    SUPERSEDED_READING,
    /** A flask was measured a second time within the series. */
    SECOND_RUN,
    /** The same series came under another batch name. */
    EXPORTED_AGAIN,
    /** Aliquots differ from flask to flask. */
    UNEQUAL_ALIQUOTS,
    /** A reading above the instrument's range. */
    OVER_RANGE,
    /** A reading below the instrument's range, or missing. */
    LEFT_OUT,
    /** A named stock was used after its last day. */
    EXPIRED_STOCK
  }
}
