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

  private final Inbox inbox;
  private final Reception reception;
  private final Filing filing;
  private final Stop stop;
  private final Standing standing = new Standing(LOG);

  Round(Inbox inbox, Reception reception, Filing filing, Stop stop) {
    this.inbox = inbox;
    this.reception = reception;
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
      take(file, received);
    }
    return new Report(received, !look.settling().isEmpty());
  }

  private void take(Sighting file, List<Arrived> received) {
    String key = file.path().toString();
    try {
      Reception.Received outcome = reception.receive(file);
      if (outcome instanceof Reception.Received.Recorded recorded) {
        received.add(recorded.arrived());
        filing.file(recorded.arrived(), file);
      } else if (outcome instanceof Reception.Received.Waits waits) {
        standing.trouble(key, "waiting file=" + file.name() + " reason=\"" + waits.why() + "\"");
        return;
      } else if (outcome instanceof Reception.Received.Kept) {
        inbox.handled(file);
      }
      standing.over(key);
    } catch (LedgerFault | IOException | UncheckedIOException trouble) {
      standing.trouble(
          key,
          "file="
              + file.name()
              + " could not be taken in and will be tried again: "
              + trouble.getMessage());
    }
  }

  private static void tell(Notice notice) {
    if (notice.phase() == Notice.Phase.BEGINS) {
      LOG.warn("{}", notice.text());
    } else {
      LOG.warn("over: {}", notice.text());
    }
  }
}
