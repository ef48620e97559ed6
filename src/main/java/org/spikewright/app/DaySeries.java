package org.spikewright.app;

import java.time.LocalDate;
import java.util.ArrayDeque;
import java.util.Deque;
import java.util.Iterator;
import java.util.List;
import java.util.NoSuchElementException;
import java.util.Optional;
import java.util.Set;
import org.spikewright.ledger.LedgerView;
import org.spikewright.reading.Recorded;
import org.spikewright.reading.Subject;
import org.spikewright.series.Drifts;
import org.spikewright.series.Gathered;
import org.spikewright.series.Gathering;

/**
 * The series of one lab day, gathered from the ledger a few subjects at a time, so that no more
 * than their readings are in memory. Walked again it gives the same, whatever arrived meanwhile.
 */
final class DaySeries implements Iterable<Gathered> {
  /** How many subjects' readings are asked for together. */
  private static final int TOGETHER = 64;

  private final LedgerView ledger;
  private final Gathering gathering;
  private final LocalDate day;
  private final long upTo;
  private final List<Subject> subjects;
  private Optional<Drifts> drifts = Optional.empty();

  /**
   * The series of a day.
   *
   * @param upTo number of the last delivery that counts
   */
  DaySeries(LedgerView ledger, Gathering gathering, LocalDate day, long upTo) {
    this(ledger, gathering, day, upTo, ledger.subjects(day, upTo));
  }

  private DaySeries(
      LedgerView ledger, Gathering gathering, LocalDate day, long upTo, List<Subject> subjects) {
    this.ledger = ledger;
    this.gathering = gathering;
    this.day = day;
    this.upTo = upTo;
    this.subjects = subjects;
  }

  /** The series of some subjects alone. */
  DaySeries of(Set<Subject> wanted) {
    List<Subject> some = subjects.stream().filter(wanted::contains).toList();
    return new DaySeries(ledger, gathering, day, upTo, some);
  }

  /** Read once, when the first series is asked for: most days have no drift checks. */
  private Drifts drifts() {
    if (drifts.isEmpty()) {
      drifts = Optional.of(new Drifts(ledger.besideSamples(day, upTo)));
    }
    return drifts.get();
  }

  @Override
  public Iterator<Gathered> iterator() {
    Deque<Gathered> ready = new ArrayDeque<>();
    return new Iterator<>() {
      private int next;

      @Override
      public boolean hasNext() {
        while (ready.isEmpty() && next < subjects.size()) {
          int end = Math.min(subjects.size(), next + TOGETHER);
          gather(subjects.subList(next, end), ready);
          next = end;
        }
        return !ready.isEmpty();
      }

      @Override
      public Gathered next() {
        if (!hasNext()) {
          throw new NoSuchElementException();
        }
        return ready.remove();
      }
    };
  }

  private void gather(List<Subject> some, Deque<Gathered> ready) {
    Drifts corrected = drifts();
    List<List<Recorded>> readings = ledger.readings(some, day, upTo);
    for (int i = 0; i < some.size(); i++) {
      for (Gathered gathered :
          gathering.gather(some.get(i), corrected.corrected(readings.get(i)))) {
        if (gathered.key().labDay().equals(day)) {
          ready.add(gathered);
        }
      }
    }
  }
}
