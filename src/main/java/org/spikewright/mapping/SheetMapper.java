package org.spikewright.mapping;

import java.time.Instant;
import java.util.ArrayList;
import java.util.EnumSet;
import java.util.HashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.Set;
import java.util.stream.Stream;
import org.spikewright.mapping.FactsReader.Facts;
import org.spikewright.quantity.Quantity;
import org.spikewright.reading.Addition;
import org.spikewright.reading.Batch;
import org.spikewright.reading.BatchReading;
import org.spikewright.reading.CalibrationPoint;
import org.spikewright.reading.CheckReading;
import org.spikewright.reading.FlaskFacts;
import org.spikewright.reading.Reading;
import org.spikewright.reading.Role;
import org.spikewright.reading.SampleId;
import org.spikewright.reading.Signal;
import org.spikewright.reading.Subject;
import org.spikewright.table.Position;
import org.spikewright.table.Row;

/** Maps the data rows of one table, below its header. */
final class SheetMapper {
  /** What became of a row. */
  sealed interface Fate {
    /** It is a reading. */
    record Read(Reading reading) implements Fate {}

    /** It is a reading of a drift check or a calibration solution. */
    record OfBatch(BatchReading reading) implements Fate {}

    /** It could not be used. */
    record Refused(Rejection rejection) implements Fate {}

    /** The mapping leaves such rows out. */
    record Skipped() implements Fate {}
  }

  private static final Fate SKIPPED = new Fate.Skipped();

  private final Mapping mapping;
  private final Header header;
  private final FileState file;
  private final RowLookup lookup;
  private final NameReader names;
  private final FactsReader facts;
  private final SignalReader signals;
  private final SpreadReader spreads;
  private final RowFilter filter;
  private final Set<Fact> namedFacts;
  private final boolean batchInRow;
  private final Map<FlaskFacts, Map<Addition, FlaskFacts>> summed = new HashMap<>();
  private Subjects subjects = new Subjects("");

  SheetMapper(Mapping mapping, Header header, FileState file, Map<Fact, List<Outside>> around) {
    this.mapping = mapping;
    this.header = header;
    this.file = file;
    this.lookup = new RowLookup(mapping.places(), header, around);
    this.names = new NameReader(mapping.places(), lookup);
    this.facts = new FactsReader(mapping, lookup, names);
    this.signals = new SignalReader(mapping, lookup);
    this.spreads = new SpreadReader(mapping, lookup);
    this.filter = new RowFilter(mapping.rows(), header);
    this.namedFacts = EnumSet.noneOf(Fact.class);
    Stream.of(Fact.values()).filter(mapping.places()::isNamed).forEach(namedFacts::add);
    this.batchInRow = mapping.places().isInRow(Fact.BATCH);
  }

  /** Maps one row that is not blank. */
  Fate map(Row row) {
    RowFilter.Kind kind = filter.kind(row);
    if (kind instanceof RowFilter.Kind.LeftOut) {
      return SKIPPED;
    }
    if (kind instanceof RowFilter.Kind.Unclear unclear) {
      return refused(row, List.of(unclear.trouble()));
    }
    Role role = ((RowFilter.Kind.Measured) kind).role();
    return switch (role) {
      case SAMPLE, BLANK, CONTROL -> map(row, role);
      case DRIFT_CHECK -> besideSamples(row, Optional.empty());
      case CALIBRATION ->
          namedFacts.contains(Fact.CALIBRATION_CONCENTRATION)
              ? besideSamples(row, Optional.of(Fact.CALIBRATION_CONCENTRATION))
              : SKIPPED;
    };
  }

  /** A row of a drift check, or of a calibration solution whose concentration is a fact. */
  private Fate besideSamples(Row row, Optional<Fact> concentration) {
    lookup.beginBesideSamples(row);
    List<Trouble> troubles = new ArrayList<>(2);
    Optional<Subject> subject = subject(troubles);
    Optional<Batch> batch = batch(troubles);
    Optional<Quantity> known = concentration.flatMap(fact -> facts.quantity(fact, troubles));
    Optional<Instant> time = time(troubles);
    Optional<Signal> signal = signals.read(Optional.empty(), troubles);
    if (!troubles.isEmpty()) {
      return new Fate.Refused(Trouble.rejection(row, troubles));
    }
    String when = time.map(Instant::toString).orElse("");
    String what = concentration.map(Fact::word).orElse("");
    FileState.Counted same =
        new FileState.Counted(subject.get(), batch.get().name(), what + "\n", when);
    Position position = row.at(signalColumn(row));
    int ordinal = file.count(same);
    return new Fate.OfBatch(
        known.isPresent()
            ? new CalibrationPoint(
                subject.get(), batch.get(), time, ordinal, signal.get(), position, known.get())
            : new CheckReading(subject.get(), batch.get(), time, ordinal, signal.get(), position));
  }

  private Fate map(Row row, Role role) {
    List<Trouble> labelTroubles = lookup.begin(row);
    if (!labelTroubles.isEmpty()) {
      return refused(row, labelTroubles);
    }
    List<Trouble> troubles = new ArrayList<>(2);
    Optional<Subject> subject = subject(troubles);
    Optional<Batch> batch = batch(troubles);
    Optional<String> flask = named(Fact.FLASK, troubles);
    Optional<String> replicate = named(Fact.REPLICATE, troubles);
    Optional<Facts.Known> known = subject.flatMap(whose -> facts(whose.analyte(), role, troubles));
    boolean placed = troubles.isEmpty();
    Optional<Instant> time = time(troubles);
    Optional<Signal> signal =
        signals
            .read(known.map(Facts.Known::facts), troubles)
            .flatMap(read -> spreads.with(read, troubles));
    if (!placed) {
      return refused(row, troubles);
    }
    Draft draft =
        new Draft(subject.get(), batch.get(), flask, replicate, known.get(), time, signal);
    // A step counts for its vessel even where its signal cannot be used.
    Optional<FlaskFacts> summedFacts = summed(draft, troubles);
    if (!troubles.isEmpty()) {
      return new Fate.Refused(Trouble.rejection(row, troubles));
    }
    return new Fate.Read(reading(row, draft, summedFacts.get()));
  }

  /** What a row said, before it is a reading. */
  private record Draft(
      Subject subject,
      Batch batch,
      Optional<String> flask,
      Optional<String> replicate,
      Facts.Known known,
      Optional<Instant> time,
      Optional<Signal> signal) {
    String flaskShown() {
      return flask.orElse(known.addition());
    }

    String preparation() {
      return known.facts().preparation().shown();
    }
  }

  private Fate refused(Row row, List<Trouble> troubles) {
    if (mapping.method().sumsSteps()) {
      file.steps().lose(row.position());
    }
    return new Fate.Refused(Trouble.rejection(row, troubles));
  }

  private Reading reading(Row row, Draft draft, FlaskFacts flaskFacts) {
    return new Reading(
        draft.subject(),
        draft.batch(),
        draft.flaskShown(),
        draft.flask().isPresent(),
        replicate(draft),
        draft.replicate().isPresent(),
        draft.time(),
        draft.signal().get(),
        flaskFacts,
        row.at(signalColumn(row)));
  }

  private int signalColumn(Row row) {
    return lookup.find(Fact.SIGNAL).map(Given::index).orElse(header.width());
  }

  private String replicate(Draft draft) {
    if (draft.replicate().isPresent()) {
      return draft.replicate().get();
    }
    if (draft.time().isPresent()) {
      return "";
    }
    return Integer.toString(
        file.count(
            new FileState.Counted(
                draft.subject(), draft.batch().name(), draft.preparation(), draft.flaskShown())));
  }

  private Optional<Subject> subject(List<Trouble> troubles) {
    Optional<String> sample = names.read(Fact.SAMPLE, troubles);
    Optional<String> analyte = names.read(Fact.ANALYTE, troubles);
    Optional<String> line = named(Fact.LINE, troubles);
    Optional<String> instrument =
        lookup.find(Fact.INSTRUMENT).isPresent()
            ? names.read(Fact.INSTRUMENT, troubles)
            : Optional.of(mapping.instrument());
    if (!troubles.isEmpty()) {
      return Optional.empty();
    }
    if (!subjects.sample.equals(sample.get())) {
      subjects = new Subjects(sample.get());
    }
    return Optional.of(subjects.of(instrument.get(), analyte.get(), line.orElse("")));
  }

  /** The subjects of the sample that rows are about, so that equal ones are the same object. */
  private static final class Subjects {
    private final String sample;
    private final SampleId id;
    private final Map<List<String>, Subject> known = new HashMap<>();

    Subjects(String sample) {
      this.sample = sample;
      this.id = new SampleId(sample);
    }

    Subject of(String instrument, String analyte, String line) {
      return known.computeIfAbsent(
          List.of(instrument, analyte, line), key -> new Subject(instrument, id, analyte, line));
    }
  }

  /** A name that is looked for only where the mapping names it. */
  private Optional<String> named(Fact fact, List<Trouble> troubles) {
    return namedFacts.contains(fact) ? names.read(fact, troubles) : Optional.empty();
  }

  private Optional<Batch> batch(List<Trouble> troubles) {
    if (!batchInRow) {
      return Optional.of(file.batch());
    }
    return names.read(Fact.BATCH, troubles).map(name -> new Batch(name, true));
  }

  private Optional<Facts.Known> facts(String analyte, Role role, List<Trouble> troubles) {
    Facts found = facts.facts(analyte, role);
    if (found instanceof Facts.Unknown unknown) {
      troubles.addAll(unknown.troubles());
      return Optional.empty();
    }
    return Optional.of((Facts.Known) found);
  }

  private Optional<Instant> time(List<Trouble> troubles) {
    if (!file.isTimed()) {
      return Optional.empty();
    }
    Optional<Given> given = lookup.find(Fact.MEASURED_AT);
    if (given.isEmpty()) {
      troubles.add(lookup.missing(Fact.MEASURED_AT, Fact.MEASURED_AT.expectation(), false));
      return Optional.empty();
    }
    TimeForm form = given.get().form().time().orElseThrow();
    Understood<Instant> time = file.times(form).read(given.get().cells());
    return taken(time, given.get(), troubles);
  }

  private static <T> Optional<T> taken(Understood<T> result, Given given, List<Trouble> troubles) {
    if (result instanceof Understood.Value<T> value) {
      return Optional.of(value.value());
    }
    troubles.add(Trouble.of((Understood.Nothing<T>) result, given));
    return Optional.empty();
  }

  /** The facts with the vessel's total in place of the step's own addition. */
  private Optional<FlaskFacts> summed(Draft draft, List<Trouble> troubles) {
    FlaskFacts own = draft.known().facts();
    if (!mapping.method().sumsSteps()) {
      return Optional.of(own);
    }
    Steps.Vessel vessel =
        new Steps.Vessel(draft.subject(), draft.batch().name(), draft.preparation());
    Understood<Addition> total =
        file.steps().total(vessel, draft.flaskShown(), (Addition.OfStock) own.addition());
    if (total instanceof Understood.Value<Addition> value) {
      return Optional.of(
          summed
              .computeIfAbsent(own, key -> new HashMap<>())
              .computeIfAbsent(value.value(), own::with));
    }
    Understood.Nothing<Addition> nothing = (Understood.Nothing<Addition>) total;
    Optional<Given> given = lookup.find(Fact.ADDITION_VOLUME);
    troubles.add(
        new Trouble(
            nothing.reason(),
            given.map(Given::index).orElse(-1),
            given.map(Given::column).orElse(Fact.ADDITION_VOLUME.word()),
            Said.quoted(nothing.found()),
            nothing.expected()));
    return Optional.empty();
  }
}
