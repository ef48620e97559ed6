package org.spikewright.ledger;

import java.nio.file.Path;
import java.time.Duration;
import java.time.Instant;
import java.time.LocalDate;
import java.time.LocalTime;
import java.time.ZoneId;
import java.util.Locale;
import java.util.Optional;
import java.util.OptionalDouble;
import org.spikewright.mapping.Tally;
import org.spikewright.quantity.Measured;
import org.spikewright.quantity.Quantity;
import org.spikewright.quantity.Unit;
import org.spikewright.reading.Addition;
import org.spikewright.reading.Batch;
import org.spikewright.reading.Blanks;
import org.spikewright.reading.Design;
import org.spikewright.reading.FlaskFacts;
import org.spikewright.reading.LabCalendar;
import org.spikewright.reading.MethodFacts;
import org.spikewright.reading.Preparation;
import org.spikewright.reading.Reading;
import org.spikewright.reading.Role;
import org.spikewright.reading.SampleId;
import org.spikewright.reading.Signal;
import org.spikewright.reading.Subject;
import org.spikewright.table.Position;
import org.spikewright.table.Source;

/** Readings and deliveries to try the ledger with. */
final class Samples {
  static final LabCalendar CALENDAR =
      new LabCalendar(ZoneId.of("Europe/Lisbon"), LocalTime.of(6, 0));
  static final Duration PAUSE = Duration.ofHours(4);
  static final LocalDate DAY = LocalDate.of(2025, 1, 15);
  static final Instant MORNING = Instant.parse("2025-01-15T09:00:00Z");

  private Samples() {}

  static Ledger open(Path file) {
    return opened(Ledger.open(file, CALENDAR, PAUSE, false));
  }

  static Ledger opened(Opening opening) {
    if (opening instanceof Opening.Opened opened) {
      return opened.ledger();
    }
    throw new AssertionError("not opened: " + opening);
  }

  static Subject subject(String sample) {
    return new Subject("furnace", new SampleId(sample), "Pb", "283.3");
  }

  static FlaskFacts facts(double microlitres) {
    return facts(microlitres, Preparation.NONE);
  }

  static FlaskFacts facts(double microlitres, Preparation preparation) {
    return new FlaskFacts(
        Role.SAMPLE,
        Design.MADE_UP,
        new Addition.OfStock(
            new Quantity(microlitres, Unit.of("µL")),
            new Measured(new Quantity(10, Unit.of("mg/L")), OptionalDouble.of(0.05))),
        Optional.of(Measured.exactly(new Quantity(20, Unit.of("mL")))),
        Optional.of(Measured.exactly(new Quantity(100, Unit.of("mL")))),
        Optional.empty(),
        preparation,
        Blanks.NONE,
        MethodFacts.of(Unit.of("µg/L")));
  }

  static Reading timed(String sample, int flask, int replicate, Instant at, double signal) {
    return new Reading(
        subject(sample),
        new Batch("run", false),
        "F" + flask,
        true,
        "R" + replicate,
        true,
        Optional.of(at),
        new Signal.Value(signal, String.format(Locale.ROOT, "%s", signal)),
        facts(flask * 50),
        new Position(new Source("run.csv", Optional.empty()), 2, 5));
  }

  static Reading untimed(String sample, String batch, int flask, int replicate, double signal) {
    Reading timed = timed(sample, flask, replicate, MORNING, signal);
    return new Reading(
        timed.subject(),
        new Batch(batch, true),
        timed.flask(),
        true,
        timed.replicate(),
        true,
        Optional.empty(),
        timed.signal(),
        timed.facts(),
        timed.position());
  }

  static Reading inBatch(Reading reading, String batch, boolean delimits) {
    return new Reading(
        reading.subject(),
        new Batch(batch, delimits),
        reading.flask(),
        reading.flaskMapped(),
        reading.replicate(),
        reading.replicateMapped(),
        reading.measuredAt(),
        reading.signal(),
        reading.facts(),
        reading.position());
  }

  static Arriving arriving(String name, LocalDate labDay) {
    return new Arriving(
        name,
        100,
        "sha of " + name,
        CALENDAR.startOf(labDay).plusSeconds(3600),
        labDay,
        "furnace",
        "mapping sha",
        "name = \"furnace\"");
  }

  static Tally tally(long readings) {
    return new Tally(readings, readings, 0, 0);
  }

  /** Takes a delivery of readings that arrives on {@link #DAY}. */
  static Arrived deliver(Ledger ledger, String name, Iterable<Reading> readings) {
    return deliver(ledger, arriving(name, DAY), readings);
  }

  static Arrived deliver(Ledger ledger, Arriving file, Iterable<Reading> readings) {
    try (Delivery delivery = ledger.receive(file)) {
      long count = 0;
      for (Reading reading : readings) {
        delivery.reading(reading);
        count++;
      }
      return delivery.commit(tally(count), "", "done/" + file.labDay() + "/" + file.name());
    }
  }
}
