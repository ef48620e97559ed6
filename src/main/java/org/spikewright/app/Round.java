package org.spikewright.app;

import java.io.IOException;
import java.io.UncheckedIOException;
import java.time.Instant;
import java.util.ArrayList;
import java.util.List;
import org.slf4j.Logger;
import org.slf4j.LoggerFactory;
import org.spikewright.intake.FileState;
import org.spikewright.intake.Inbox;
import org.spikewright.intake.Look;
import org.spikewright.intake.Notice;
import org.spikewright.intake.Sighting;
import org.spikewright.ledger.Arrived;
import org.spikewright.ledger.LedgerFault;

/** One look into the watched folder, and everything that follows for the files that are ready. */
final class Round {
  private static final Logger LOG = LoggerFactory.getLogger(Round.class);

  /**
   * What a round came to.
   *
   * @param received deliveries that were recorded
   * @param settling whether a file may still be written
   */
  record Report(List<Arrived> received, boolean settling) {}

  /** Takes one file in. */
  interface Receiver {
    Reception.Received receive(Sighting file) throws IOException;
  }

  private final Inbox inbox;
  private final Receiver receiver;
  private final Filing filing;
  private final Stop stop;
  private final Standing failing = new Standing(LOG);
  private final Standing waiting = new Standing(LOG);
  private final Retries retries = new Retries();

  Round(Inbox inbox, Receiver receiver, Filing filing, Stop stop) {
    this.inbox = inbox;
    this.receiver = receiver;
    this.filing = filing;
    this.stop = stop;
  }

  /** Looks, takes in what is ready, files it away. Trouble with one file never stops the others. */
  Report run(Instant now) {
    filing.finishInterrupted();
    Look look = inbox.look(now);
    look.notices().forEach(Round::tell);
    for (FileState.Waiting waiting : look.waiting()) {
      LOG.debug("waiting file={} reason={}", waiting.sighting().name(), waiting.reason());
    }
    List<Arrived> received = new ArrayList<>();
    for (Sighting file : look.ready()) {
      if (stop.isRequested()) {
        break;
      }
      if (retries.isDue(file, now)) {
        take(file, now, received);
      }
    }
    return new Report(received, !look.settling().isEmpty());
  }

  /** What could not be taken in, and why; it is tried again. */
  List<String> failing() {
    return failing.texts();
  }

  /** What waits for a person, and why. */
  List<String> waiting() {
    return waiting.texts();
  }

  private void take(Sighting file, Instant now, List<Arrived> received) {
    String key = file.path().toString();
    try {
      Reception.Received outcome = receiver.receive(file);
      if (outcome instanceof Reception.Received.Recorded recorded) {
        received.add(recorded.arrived());
        filing.file(recorded.arrived(), file);
      } else if (outcome instanceof Reception.Received.Waits waits) {
        waiting.trouble(key, "waiting file=" + file.name() + " reason=\"" + waits.why() + "\"");
        failing.over(key);
        return;
      } else if (outcome instanceof Reception.Received.Kept) {
        inbox.handled(file);
      }
      waiting.over(key);
      failing.over(key);
      retries.over(file);
    } catch (LedgerFault | IOException | UncheckedIOException trouble) {
      failed(file, now, trouble.getMessage());
    } catch (RuntimeException | StackOverflowError fault) {
      // A fault of the program that this file brings out must not keep the others waiting.
      LOG.debug("fault at file={}", file.name(), fault);
      failed(file, now, "a fault of the program (" + fault + ")");
    }
  }

  private void failed(Sighting file, Instant now, String why) {
    retries.failed(file, now);
    failing.trouble(
        file.path().toString(),
        "file=" + file.name() + " could not be taken in and will be tried again: " + why);
  }

  private static void tell(Notice notice) {
    if (notice.phase() == Notice.Phase.BEGINS) {
      LOG.warn("{}", notice.text());
    } else {
      LOG.warn("over: {}", notice.text());
    }
  }
}
