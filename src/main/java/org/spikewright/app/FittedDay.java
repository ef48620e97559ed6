package org.spikewright.app;

import java.util.ArrayList;
import java.util.Iterator;
import java.util.List;
import java.util.NoSuchElementException;
import java.util.Optional;
import java.util.function.LongConsumer;
import org.spikewright.analysis.Fitted;
import org.spikewright.series.AdditionSeries;
import org.spikewright.series.Gathered;

/**
 * The series of one lab day, each fitted by itself. The first walk reads them a little ahead and
 * keeps them, unless that would take too much memory; then every walk reads them anew.
 */
final class FittedDay implements Iterable<Fitted>, AutoCloseable {
  private final Iterable<Gathered> series;
  private final Stop stop;
  private final LongConsumer counted;
  private final long mostReadings = KeptNight.mostReadings();
  private Optional<Ahead<Gathered>> reading = Optional.empty();
  private List<Fitted> kept = new ArrayList<>();
  private boolean whole;

  /**
   * A lab day.
   *
   * @param stop ends a walk early; whoever walks asks it afterwards
   * @param counted is told how many series the first walk has fitted
   */
  FittedDay(Iterable<Gathered> series, Stop stop, LongConsumer counted) {
    this.series = series;
    this.stop = stop;
    this.counted = counted;
  }

  @Override
  public Iterator<Fitted> iterator() {
    if (whole) {
      return kept.iterator();
    }
    close();
    Ahead<Gathered> ahead = new Ahead<>(series);
    reading = Optional.of(ahead);
    kept = new ArrayList<>();
    return new Walk(ahead);
  }

  private final class Walk implements Iterator<Fitted> {
    private final Ahead<Gathered> ahead;
    private long count;
    private long readings;
    private boolean fits = true;

    Walk(Ahead<Gathered> ahead) {
      this.ahead = ahead;
    }

    @Override
    public boolean hasNext() {
      if (stop.isRequested()) {
        return false;
      }
      boolean more = ahead.hasNext();
      whole = !more && fits;
      return more;
    }

    @Override
    public Fitted next() {
      if (!hasNext()) {
        throw new NoSuchElementException();
      }
      Fitted fitted = Fitted.of(ahead.next());
      keep(fitted);
      counted.accept(++count);
      return fitted;
    }

    private void keep(Fitted fitted) {
      readings += 1 + (fitted.gathered() instanceof AdditionSeries one ? one.readings() : 0);
      fits &= readings <= mostReadings;
      if (fits) {
        kept.add(fitted);
      } else {
        kept = List.of();
      }
    }
  }

  @Override
  public void close() {
    reading.ifPresent(Ahead::close);
    reading = Optional.empty();
  }
}
