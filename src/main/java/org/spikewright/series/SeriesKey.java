package org.spikewright.series;

import java.time.LocalDate;
import java.util.Comparator;
import org.spikewright.reading.Subject;

/**
 * The identity of a series. It does not change when a late delivery adds a flask.
 *
 * @param labDay the lab day of its first reading
 * @param subject whose series it is
 * @param batch the batch that delimits it; empty when time alone does
 * @param preparation {@link org.spikewright.reading.Preparation#shown()}; empty when nothing was
 *     done
 * @param ordinal 1 for the first such series of the lab day, 2 for the next
 */
public record SeriesKey(
    LocalDate labDay, Subject subject, String batch, String preparation, int ordinal)
    implements Comparable<SeriesKey> {

  private static final Comparator<SeriesKey> ORDER =
      Comparator.comparing(SeriesKey::labDay)
          .thenComparing(SeriesKey::subject)
          .thenComparing(SeriesKey::batch)
          .thenComparing(SeriesKey::preparation)
          .thenComparingInt(SeriesKey::ordinal);

  /** The key of another such series of the lab day. */
  SeriesKey withOrdinal(int other) {
    return new SeriesKey(labDay, subject, batch, preparation, other);
  }

  @Override
  public int compareTo(SeriesKey other) {
    return ORDER.compare(this, other);
  }
}
