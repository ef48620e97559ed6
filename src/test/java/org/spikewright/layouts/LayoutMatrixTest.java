package org.spikewright.layouts;

import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.within;

import java.nio.file.Path;
import java.time.Duration;
import java.time.Instant;
import java.time.ZoneId;
import java.util.ArrayList;
import java.util.List;
import java.util.Map;
import java.util.TreeMap;
import java.util.stream.Stream;
import org.junit.jupiter.api.io.TempDir;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.Arguments;
import org.junit.jupiter.params.provider.MethodSource;
import org.spikewright.config.Loaded;
import org.spikewright.config.MappingFile;
import org.spikewright.decode.FileDecoder;
import org.spikewright.judgement.CriteriaBook;
import org.spikewright.judgement.Judge;
import org.spikewright.judgement.Outcome;
import org.spikewright.mapping.MappedFile;
import org.spikewright.mapping.MappedSink;
import org.spikewright.mapping.Mapping;
import org.spikewright.mapping.Rejection;
import org.spikewright.mapping.RowMapper;
import org.spikewright.quantity.Unit;
import org.spikewright.reading.BatchReading;
import org.spikewright.reading.Reading;
import org.spikewright.reading.Recorded;
import org.spikewright.reading.Signal;
import org.spikewright.reading.Subject;
import org.spikewright.series.AdditionSeries;
import org.spikewright.series.Flask;
import org.spikewright.series.Gathered;
import org.spikewright.series.Gathering;
import org.spikewright.series.GatheringRules;
import org.spikewright.testkit.Bench;

/**
 * One seeded truth in every layout, as text in four locales and encodings and as workbooks of both
 * kinds: readings and results are the same to the bit; where only mean and standard deviation are
 * printed, to the digits printed.
 */
class LayoutMatrixTest {
  private static final long SEED = 20260304;

  @TempDir Path folder;

  private int written;

  static Stream<Arguments> matrix() {
    return Stream.of(Layout.values())
        .flatMap(layout -> Stream.of(Form.values()).map(form -> Arguments.of(layout, form)));
  }

  @ParameterizedTest(name = "{0} as {1}")
  @MethodSource("matrix")
  void every_layout_in_every_kind_of_file_gives_the_same(Layout layout, Form form) {
    Truth truth = Truth.of(SEED);
    List<Reading> readings = read(layout, form, truth);
    if (layout != Layout.MEAN_AND_SD) {
      assertThat(shown(readings)).containsExactlyInAnyOrderElementsOf(shown(truth));
    }
    Map<String, Double> expected = results(read(Layout.LONG, Form.COMMA_POINT_UTF8, truth));
    assertThat(expected).hasSize(6);
    Map<String, Double> found = results(readings);
    if (layout == Layout.MEAN_AND_SD) {
      assertThat(found.keySet()).isEqualTo(expected.keySet());
      expected.forEach(
          (series, value) ->
              assertThat(found.get(series)).as(series).isCloseTo(value, within(value * 1e-5)));
    } else {
      assertThat(found).isEqualTo(expected);
    }
  }

  private static List<String> shown(Truth truth) {
    return truth.readings().stream()
        .map(
            r ->
                String.join(
                    " ",
                    r.sample(),
                    r.analyte(),
                    "" + r.added().doubleValue(),
                    "" + r.replicate(),
                    "" + r.signal().doubleValue()))
        .toList();
  }

  private static List<String> shown(List<Reading> readings) {
    return readings.stream()
        .map(
            r ->
                String.join(
                    " ",
                    r.subject().sample().text(),
                    r.subject().analyte(),
                    "" + r.facts().addition().amount().in(Unit.of("mL")),
                    r.replicate(),
                    "" + ((Signal.Value) r.signal()).value()))
        .toList();
  }

  private List<Reading> read(Layout layout, Form form, Truth truth) {
    Loaded<Mapping> loaded =
        MappingFile.read(Path.of("matrix.toml"), layout.mapping(), ZoneId.of("UTC"));
    assertThat(loaded).as(loaded.toString()).isInstanceOf(Loaded.Good.class);
    Mapping mapping = ((Loaded.Good<Mapping>) loaded).value();
    Kept kept = new Kept();
    layout
        .files(truth)
        .forEach(
            (name, sheets) -> {
              // Not every machine can name a file as a sample is named.
              Path file = folder.resolve("file" + written++ + form.extension());
              form.write(file, sheets);
              RowMapper mapper = mapping.open(name + form.extension(), kept);
              assertThat(FileDecoder.read(file, name, mapping.shape(), mapper)).isEmpty();
              MappedFile mapped = mapper.finish();
              assertThat(mapped).as(mapped.toString()).isInstanceOf(MappedFile.Mapped.class);
            });
    assertThat(kept.rejections).isEmpty();
    return kept.readings;
  }

  /** The result of each series, and what it is made of. */
  private static Map<String, Double> results(List<Reading> readings) {
    Map<Subject, List<Recorded>> bySubject = new TreeMap<>();
    for (Reading reading : readings) {
      bySubject
          .computeIfAbsent(reading.subject(), subject -> new ArrayList<>())
          .add(new Recorded(reading, 1, Bench.ARRIVAL, 0));
    }
    Gathering gathering = new Gathering(new GatheringRules(Bench.CALENDAR, Duration.ofHours(4)));
    Judge judge = new Judge(CriteriaBook.defaults(), Instant.MAX, Duration.ofHours(1));
    Map<String, Double> results = new TreeMap<>();
    bySubject.forEach(
        (subject, all) -> {
          for (Gathered gathered : gathering.gather(subject, all)) {
            Outcome outcome = judge.judge(gathered);
            results.put(
                subject.sample() + " " + subject.analyte(), outcome.result().orElseThrow().value());
            for (Flask flask : ((AdditionSeries) gathered).flasks()) {
              assertThat(flask.numbers()).isEqualTo(Truth.REPLICATES);
              assertThat(flask.replicateSd()).isBetween(1e-4, 0.1);
            }
          }
        });
    return results;
  }

  private static final class Kept implements MappedSink {
    final List<Reading> readings = new ArrayList<>();
    final List<Rejection> rejections = new ArrayList<>();

    @Override
    public void reading(Reading reading) {
      readings.add(reading);
    }

    @Override
    public void batchReading(BatchReading beside) {
      throw new AssertionError("nothing beside the samples is expected: " + beside);
    }

    @Override
    public void rejection(Rejection rejection) {
      rejections.add(rejection);
    }
  }
}
