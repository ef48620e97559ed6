package org.spikewright.app;

import java.io.IOException;
import java.nio.file.Path;
import java.time.format.DateTimeFormatter;
import java.util.Locale;
import org.slf4j.Logger;
import org.slf4j.LoggerFactory;
import org.spikewright.intake.Archive;
import org.spikewright.intake.Beside;
import org.spikewright.intake.Filed;
import org.spikewright.intake.Inbox;
import org.spikewright.intake.Journalled;
import org.spikewright.intake.Sighting;
import org.spikewright.ledger.Arrived;
import org.spikewright.ledger.LedgerFault;

/**
 * Files recorded deliveries away. The ledger comes first: a delivery that is recorded but not filed
 * is filed at the next round or the next start, and is never counted again.
 */
final class Filing {
  private static final Logger LOG = LoggerFactory.getLogger(Filing.class);
  private static final DateTimeFormatter WHEN =
      DateTimeFormatter.ofPattern("uuuu-MM-dd HH:mm", Locale.ROOT);

  private final Station station;
  private final Archive archive;
  private final Inbox inbox;
  private final Standing standing = new Standing(LOG);

  Filing(Station station, Inbox inbox) {
    this.station = station;
    this.archive = station.archive();
    this.inbox = inbox;
  }

  /** Files a delivery that was just recorded. */
  void file(Arrived arrived, Sighting sighting) throws IOException {
    if (station.settings().leave()) {
      inbox.handled(sighting);
      station.ledger().filed(arrived.number(), left(arrived));
      return;
    }
    Filed filed = move(arrived, sighting, arrived.archiveName());
    if (filed instanceof Filed.Failed) {
      inbox.handled(sighting);
    }
    String target = arrived.archiveName();
    if (filed instanceof Filed.Occupied) {
      target = anotherName(arrived);
      filed = move(arrived, sighting, target);
    }
    finish(arrived, filed, target);
  }

  private Filed move(Arrived arrived, Sighting file, String target) {
    return arrived.outcome() == Arrived.Result.REFUSED
        ? archive.refuse(file.path(), file.fingerprint(), target, reasonText(arrived))
        : archive.move(file.path(), file.fingerprint(), target);
  }

  /** Finishes what a crash or a full disk interrupted. */
  void finishInterrupted() {
    for (Arrived arrived : station.ledger().unfiled()) {
      try {
        if (station.settings().leave()) {
          station.ledger().filed(arrived.number(), left(arrived));
          continue;
        }
        String target = arrived.archiveName();
        Filed filed = resume(arrived, target);
        if (filed instanceof Filed.Occupied) {
          target = anotherName(arrived);
          filed = resume(arrived, target);
        }
        finish(arrived, filed, target);
      } catch (IOException | LedgerFault trouble) {
        waits(arrived, trouble.getMessage());
      } catch (RuntimeException fault) {
        // One delivery that cannot be filed must not keep the others from being read.
        LOG.debug("fault at file={}", arrived.name(), fault);
        waits(arrived, "a fault of the program (" + fault + ")");
      }
    }
  }

  private static String left(Arrived arrived) {
    return "left at " + arrived.name();
  }

  private Filed resume(Arrived arrived, String target) {
    Path from = station.settings().watch().resolve(arrived.name());
    return arrived.outcome() == Arrived.Result.REFUSED
        ? archive.resumeRefusal(from, arrived.sha256(), target, reasonText(arrived))
        : archive.resume(from, arrived.sha256(), target);
  }

  /** Somebody else's file lies under the promised name and stays there. */
  private String anotherName(Arrived arrived) throws IOException {
    return arrived.outcome() == Arrived.Result.REFUSED
        ? archive.rejectedName(arrived.name(), station.ledger()::archiveNameTaken)
        : archive.doneName(arrived.labDay(), arrived.name(), station.ledger()::archiveNameTaken);
  }

  private void finish(Arrived arrived, Filed filed, String target) throws IOException {
    if (filed instanceof Filed.Moved) {
      writeBeside(arrived, target);
      station.ledger().filed(arrived.number(), target);
      standing.over(arrived.name());
    } else if (filed instanceof Filed.Withdrawn withdrawn) {
      LOG.warn("file={} was recorded but not archived: {}", arrived.name(), withdrawn.why());
      station.ledger().filed(arrived.number(), "not archived: " + withdrawn.why());
    } else if (filed instanceof Filed.Occupied occupied) {
      waits(arrived, occupied.why());
    } else if (filed instanceof Filed.Failed failed) {
      waits(arrived, failed.why());
    }
  }

  private void waits(Arrived arrived, String why) {
    standing.trouble(
        arrived.name(),
        "file="
            + arrived.name()
            + " is recorded but cannot be moved to "
            + arrived.archiveName()
            + " yet, and will be tried again: "
            + why);
  }

  private void writeBeside(Arrived arrived, String target) throws IOException {
    if (arrived.outcome() == Arrived.Result.REFUSED) {
      return;
    }
    if (arrived.outcome() == Arrived.Result.KNOWN) {
      archive.note(
          target,
          Beside.NOTE,
          arrived.name() + " holds " + arrived.reason() + ". Nothing was counted again.\n");
    } else if (RowsText.isDue(arrived)) {
      archive.note(target, Beside.ROWS, RowsText.lines(arrived, station.ledger()));
    }
    archive.journal(
        arrived.labDay(),
        new Journalled(
            arrived.number(), arrived.sha256(), arrived.name(), arrived.mappingSha256()));
  }

  private String reasonText(Arrived arrived) {
    String when =
        WHEN.format(arrived.arrivedAt().atZone(station.settings().calendar().zone()))
            + " ("
            + station.settings().calendar().zone()
            + ")";
    return Refusal.text(arrived.name(), when, arrived.reason());
  }
}
