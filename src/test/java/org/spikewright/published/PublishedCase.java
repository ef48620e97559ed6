package org.spikewright.published;

import java.nio.file.Path;
import java.time.Duration;
import java.time.Instant;
import java.time.LocalTime;
import java.time.ZoneId;
import java.util.ArrayList;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.TreeMap;
import org.spikewright.config.Loaded;
import org.spikewright.config.MappingFile;
import org.spikewright.decode.FileDecoder;
import org.spikewright.judgement.CriteriaBook;
import org.spikewright.judgement.Flag;
import org.spikewright.judgement.FlagKind;
import org.spikewright.judgement.Judge;
import org.spikewright.judgement.Outcome;
import org.spikewright.judgement.SeriesResult;
import org.spikewright.mapping.MappedFile;
import org.spikewright.mapping.MappedSink;
import org.spikewright.mapping.Mapping;
import org.spikewright.mapping.Rejection;
import org.spikewright.mapping.RowMapper;
import org.spikewright.reading.BatchReading;
import org.spikewright.reading.LabCalendar;
import org.spikewright.reading.Reading;
import org.spikewright.reading.Recorded;
import org.spikewright.reading.Subject;
import org.spikewright.series.Gathered;
import org.spikewright.series.Gathering;
import org.spikewright.series.GatheringRules;
import org.spikewright.table.DecodeFault;

/**
 * One export, read by one mapping and judged: decoder, mapping, gathering and judge as they run.
 */
public final class PublishedCase {
  /** Where the cases lie: a folder each, with {@code mapping.toml} and the export. */
  static final Path FOLDER = Path.of("src", "test", "resources", "published");

  private static final ZoneId ZONE = ZoneId.of("UTC");
  private static final Instant ARRIVED = Instant.parse("2026-03-04T12:00:00Z");
  private static final Instant MOMENT = Instant.parse("2026-03-05T06:30:00Z");

  private final List<Outcome> outcomes;

  private PublishedCase(List<Outcome> outcomes) {
    this.outcomes = outcomes;
  }

  /** A case whose export lies beside its mapping, by its place in the watched folder. */
  static PublishedCase of(String id, String export) {
    return of(id, FOLDER.resolve(id).resolve(export), export);
  }

  /** A case whose export was written by the test. */
  static PublishedCase of(String id, Path file, String export) {
    return read(FOLDER.resolve(id).resolve("mapping.toml"), file, export);
  }

  /** What a mapping makes of an export that is known in the watched folder by a name. */
  public static PublishedCase read(Path mapping, Path file, String name) {
    return of(mapping(MappingFile.load(mapping, ZONE)), file, name);
  }

  /** What a mapping's text makes of an export. */
  public static PublishedCase read(String mapping, Path file, String name) {
    return of(mapping(MappingFile.read(Path.of("mapping.toml"), mapping, ZONE)), file, name);
  }

  private static PublishedCase of(Mapping mapping, Path file, String name) {
    if (!mapping.claims(name)) {
      throw new AssertionError(mapping.files() + " does not claim " + name);
    }
    Readings readings = new Readings();
    RowMapper mapper = mapping.open(name, readings);
    Optional<DecodeFault> fault = FileDecoder.read(file, name, mapping.shape(), mapper::accept);
    MappedFile mapped = mapper.finish();
    if (fault.isPresent() || !(mapped instanceof MappedFile.Mapped) || !readings.allUsed()) {
      throw new AssertionError(name + ": " + fault + " " + mapped + " " + readings.rejections);
    }
    return new PublishedCase(judged(readings.recorded));
  }

  private static Mapping mapping(Loaded<Mapping> loaded) {
    if (loaded instanceof Loaded.Good<Mapping> good) {
      return good.value();
    }
    throw new AssertionError(((Loaded.Faulty<Mapping>) loaded).faults().toString());
  }

  private static List<Outcome> judged(List<Recorded> recorded) {
    Map<Subject, List<Recorded>> bySubject = new TreeMap<>();
    recorded.forEach(
        r -> bySubject.computeIfAbsent(r.reading().subject(), s -> new ArrayList<>()).add(r));
    Gathering gathering =
        new Gathering(
            new GatheringRules(new LabCalendar(ZONE, LocalTime.of(6, 0)), Duration.ofHours(4)));
    Judge judge = new Judge(CriteriaBook.defaults(), MOMENT, Duration.ofHours(12));
    List<Outcome> outcomes = new ArrayList<>();
    bySubject.forEach(
        (subject, readings) -> {
          for (Gathered gathered : gathering.gather(subject, readings)) {
            outcomes.add(judge.judge(gathered));
          }
        });
    return outcomes;
  }

  /** All outcomes, by subject and series. */
  public List<Outcome> outcomes() {
    return List.copyOf(outcomes);
  }

  /** The only outcome. */
  public Outcome only() {
    if (outcomes.size() != 1) {
      throw new AssertionError("not one outcome: " + outcomes);
    }
    return outcomes.get(0);
  }

  /** The only result. */
  public SeriesResult result() {
    return only().result().orElseThrow(() -> new AssertionError("no result: " + only().flags()));
  }

  /** The kinds of the only outcome's flags. */
  public List<FlagKind> flags() {
    return only().flags().stream().map(Flag::kind).toList();
  }

  private static final class Readings implements MappedSink {
    private final List<Recorded> recorded = new ArrayList<>();
    private final List<Rejection> rejections = new ArrayList<>();

    @Override
    public void reading(Reading reading) {
      recorded.add(new Recorded(reading, 1, ARRIVED, 0));
    }

    @Override
    public void batchReading(BatchReading reading) {
      throw new AssertionError("not expected: " + reading);
    }

    @Override
    public void rejection(Rejection rejection) {
      rejections.add(rejection);
    }

    private boolean allUsed() {
      return rejections.isEmpty();
    }
  }
}
