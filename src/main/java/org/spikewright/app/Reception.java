package org.spikewright.app;

import java.io.IOException;
import java.time.Instant;
import java.time.LocalDate;
import java.util.HashSet;
import java.util.List;
import java.util.Optional;
import java.util.Set;
import java.util.function.Predicate;
import java.util.stream.Collectors;
import org.slf4j.Logger;
import org.slf4j.LoggerFactory;
import org.spikewright.decode.FileDecoder;
import org.spikewright.intake.FileDigest;
import org.spikewright.intake.Fingerprint;
import org.spikewright.intake.Sighting;
import org.spikewright.ledger.Arrived;
import org.spikewright.ledger.Arriving;
import org.spikewright.ledger.Delivery;
import org.spikewright.mapping.MappedFile;
import org.spikewright.mapping.Mapping;
import org.spikewright.mapping.Rejection;
import org.spikewright.mapping.RowMapper;
import org.spikewright.mapping.Tally;
import org.spikewright.reading.Subject;
import org.spikewright.table.DecodeFault;
import org.spikewright.table.Row;
import org.spikewright.table.RowSink;
import org.spikewright.table.TextForm;

/** Takes one settled file in: known already, refused, or read in one transaction. */
final class Reception {
  private static final Logger LOG = LoggerFactory.getLogger(Reception.class);

  /** How many samples without additions a text names. */
  private static final int NAMED = 20;

  /** What became of a file. */
  sealed interface Received {
    /** It is in the ledger, read or refused, and is to be filed away. */
    record Recorded(Arrived arrived) implements Received {}

    /** It stays where it is and is looked at again. */
    record Waits(String why) implements Received {}

    /** It is in the ledger already and stays where it is. */
    record Kept() implements Received {}

    /** It was let go because the program stops, or because it changed; nothing happened. */
    record LetGo() implements Received {}
  }

  private final Station station;
  private final Stop stop;
  private final Progress progress;

  /** What was said to have arrived and is not recorded yet, since it may be tried many times. */
  private final Set<Sighting> announced = new HashSet<>();

  Reception(Station station, Stop stop, Progress progress) {
    this.station = station;
    this.stop = stop;
    this.progress = progress;
  }

  Received receive(Sighting file) throws IOException {
    Received received = tryToReceive(file);
    announced.remove(file);
    return received;
  }

  private Received tryToReceive(Sighting file) throws IOException {
    Instant now = station.clock().instant();
    LocalDate day = station.settings().calendar().dayOf(now);
    List<Mapping> claimants =
        station.mappings().good().stream().filter(m -> m.claims(file.name())).toList();
    if (claimants.isEmpty() && !station.faultyMappings().isEmpty()) {
      // Before its bytes are digested: it is asked again at each look.
      return new Received.Waits(
          "no mapping claims it, and a mapping that may do so is faulty: "
              + station.faultyMappings().get(0));
    }
    FileDigest.Content content = FileDigest.contentOf(file.path());
    String sha256 = content.sha256();
    if (isAwaitingFiling(file, sha256)) {
      return new Received.Kept();
    }
    Optional<Long> known = station.ledger().known(sha256);
    if (known.isPresent() && station.settings().leave()) {
      return new Received.Kept();
    }
    if (known.isPresent()) {
      Arriving again = arriving(file, sha256, now, Optional.empty());
      return recorded(station.ledger().again(again, known.get(), doneName(day, file)));
    }
    if (announced.add(file)) {
      LOG.info("arrived file={} bytes={}", file.name(), file.size());
    }
    if (claimants.size() != 1) {
      Refusal refusal =
          claimants.isEmpty()
              ? Refusal.unclaimed(station.mappings().good())
              : Refusal.claimedByMany(claimants);
      return refuse(file, arriving(file, sha256, now, Optional.empty()), refusal);
    }
    Arriving arriving = arriving(file, sha256, now, Optional.of(claimants.get(0)));
    return read(file, content, arriving, claimants.get(0));
  }

  /** Whether it was recorded before and only could not be moved yet. */
  private boolean isAwaitingFiling(Sighting file, String sha256) {
    return station.ledger().unfiled().stream()
        .anyMatch(a -> a.name().equals(file.name()) && a.sha256().equals(sha256));
  }

  private Received read(
      Sighting file, FileDigest.Content content, Arriving arriving, Mapping mapping)
      throws IOException {
    Optional<Refusal> refusal;
    // Closed in the reverse order: nothing is recorded any more when the delivery is forgotten.
    try (Delivery delivery = station.ledger().receive(arriving);
        Handover sink = new Handover(delivery)) {
      RowMapper mapper = mapping.open(file.name(), sink);
      String reading = "reading " + file.name() + ", row";
      Optional<DecodeFault> fault =
          FileDecoder.read(
              file.path(),
              file.name(),
              mapping.shape(),
              new RowSink() {
                @Override
                public boolean accept(Row row) {
                  progress.at(reading, row.number());
                  return mapper.accept(row) && !stop.isRequested();
                }

                @Override
                public void begins(TextForm form) {
                  mapper.begins(form);
                }
              });
      if (stop.isRequested() || changed(file, content)) {
        return new Received.LetGo();
      }
      sink.finish();
      MappedFile mapped = mapper.finish();
      if (fault.isEmpty() && mapped instanceof MappedFile.Mapped done) {
        LOG.info("taken file={} as=\"{}\"", file.name(), String.join("; ", done.workedOut()));
        return recorded(record(delivery, done.tally(), sink.first(), file, arriving));
      }
      refusal =
          fault.map(Refusal::of).or(() -> Optional.of(Refusal.of((MappedFile.Unmappable) mapped)));
    }
    return refuse(file, arriving, refusal.orElseThrow());
  }

  private Arrived record(
      Delivery delivery, Tally tally, List<Rejection> first, Sighting file, Arriving arriving)
      throws IOException {
    if (!tally.isOfUse()) {
      Refusal refusal = Refusal.withoutReadings(tally, first);
      return delivery.refuse(tally, refusal.words(), rejectedName(file));
    }
    String note = withoutAdditions(delivery.withoutAdditions());
    return delivery.commit(tally, note, doneName(arriving.labDay(), file));
  }

  private static String withoutAdditions(List<Subject> subjects) {
    if (subjects.isEmpty()) {
      return "";
    }
    String names =
        subjects.stream()
            .limit(NAMED)
            .map(subject -> subject.sample() + " " + subject.analyte())
            .collect(Collectors.joining(", "));
    return "No flask with an addition so far: "
        + names
        + (subjects.size() > NAMED ? " and " + (subjects.size() - NAMED) + " more" : "")
        + ". Deliver the flasks with additions; until then there is no result.";
  }

  private Received refuse(Sighting file, Arriving arriving, Refusal refusal) throws IOException {
    return recorded(station.ledger().refuse(arriving, refusal.words(), rejectedName(file)));
  }

  private static Received recorded(Arrived arrived) {
    switch (arrived.outcome()) {
      case READ ->
          LOG.info(
              "read file={} readings={} refused_rows={} skipped={} beside_samples={} known={}",
              arrived.name(),
              arrived.tally().readings(),
              arrived.tally().rejections(),
              arrived.tally().skipped(),
              arrived.tally().checks() + arrived.tally().calibrations(),
              arrived.repeated());
      case REFUSED ->
          LOG.info(
              "refused file={} reason=\"{}\"", arrived.name(), Refusal.oneLine(arrived.reason()));
      case KNOWN -> LOG.info("known file={} note=\"{}\"", arrived.name(), arrived.reason());
    }
    return new Received.Recorded(arrived);
  }

  /** Whether what was decoded may not be what was digested. */
  private static boolean changed(Sighting file, FileDigest.Content content) throws IOException {
    return !Fingerprint.of(file.path()).equals(Optional.of(file.fingerprint()))
        || FileDigest.crc32(file.path()) != content.crc32();
  }

  private Arriving arriving(Sighting file, String sha256, Instant now, Optional<Mapping> mapping) {
    return new Arriving(
        file.name(),
        file.size(),
        sha256,
        now,
        station.settings().calendar().dayOf(now),
        mapping.map(Mapping::name).orElse(""),
        mapping.map(Mapping::sha256).orElse(""),
        mapping.map(Mapping::text).orElse(""));
  }

  private String doneName(LocalDate day, Sighting file) throws IOException {
    return station.archive().doneName(day, file.name(), promised());
  }

  private String rejectedName(Sighting file) throws IOException {
    return station.archive().rejectedName(file.name(), promised());
  }

  private Predicate<String> promised() {
    return station.ledger()::archiveNameTaken;
  }
}
