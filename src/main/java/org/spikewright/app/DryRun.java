package org.spikewright.app;

import java.io.PrintWriter;
import java.nio.file.Path;
import java.time.Instant;
import java.util.ArrayList;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Locale;
import java.util.Map;
import java.util.Optional;
import java.util.TreeMap;
import org.spikewright.analysis.Analysis;
import org.spikewright.analysis.DayFacts;
import org.spikewright.analysis.Fitted;
import org.spikewright.config.Settings;
import org.spikewright.decode.FileDecoder;
import org.spikewright.judgement.Judge;
import org.spikewright.judgement.Outcome;
import org.spikewright.mapping.MappedFile;
import org.spikewright.mapping.MappedSink;
import org.spikewright.mapping.Mapping;
import org.spikewright.mapping.Rejection;
import org.spikewright.mapping.RowMapper;
import org.spikewright.mapping.Tally;
import org.spikewright.quantity.Numbers;
import org.spikewright.reading.BatchReading;
import org.spikewright.reading.Reading;
import org.spikewright.reading.Recorded;
import org.spikewright.reading.Subject;
import org.spikewright.series.AdditionSeries;
import org.spikewright.series.Flask;
import org.spikewright.series.Gathered;
import org.spikewright.series.Gathering;
import org.spikewright.series.GatheringRules;
import org.spikewright.series.Ungrouped;
import org.spikewright.table.DecodeFault;

/** Shows what a mapping makes of an export: the first readings, the series, the refused rows. */
final class DryRun {
  private static final int READINGS_SHOWN = 12;
  private static final int SERIES_SHOWN = 20;
  private static final int REFUSALS_SHOWN = 20;

  private final Mapping mapping;
  private final Settings settings;
  private final PrintWriter out;
  private final List<Reading> readings = new ArrayList<>();
  private final List<Rejection> rejections = new ArrayList<>();

  DryRun(Mapping mapping, Settings settings, PrintWriter out) {
    this.mapping = mapping;
    this.settings = settings;
    this.out = out;
  }

  /**
   * Reads and shows.
   *
   * @param name by which the watched folder would know the export
   * @return whether export and mapping are fit for use
   */
  boolean show(Path export, String name) {
    out.println("Export   " + name);
    out.println("Mapping  " + mapping.name() + ", instrument " + mapping.instrument());
    RowMapper mapper = mapping.open(name, new Kept());
    Optional<DecodeFault> fault = FileDecoder.read(export, name, mapping.shape(), mapper);
    MappedFile mapped = mapper.finish();
    boolean fit;
    if (fault.isPresent()) {
      fit = refused(Refusal.of(fault.get()));
    } else if (mapped instanceof MappedFile.Unmappable unmappable) {
      fit = refused(Refusal.of(unmappable));
    } else {
      ((MappedFile.Mapped) mapped).workedOut().forEach(line -> out.println("Taken    " + line));
      fit = understood(((MappedFile.Mapped) mapped).tally());
    }
    out.flush();
    return fit;
  }

  private boolean refused(Refusal refusal) {
    out.println();
    out.println(refusal.words());
    out.println();
    out.println("Not fit for use: the file would be refused as a whole.");
    return false;
  }

  private boolean understood(Tally tally) {
    out.printf(
        Locale.ROOT,
        "Rows     %d: %d readings, %d refused, %d skipped as the mapping says%s%n",
        tally.rows(),
        tally.readings(),
        tally.rejections(),
        tally.skipped(),
        tally.besideSamples());
    firstReadings();
    int without = series();
    refusals();
    out.println();
    boolean fit = tally.isOfUse() && tally.rejections() == 0 && without == 0;
    out.println(fit ? "Fit for use." : "Not fit for use: " + why(tally, without) + ".");
    return fit;
  }

  private static String why(Tally tally, int without) {
    List<String> reasons = new ArrayList<>();
    if (!tally.isOfUse() && tally.readings() == 0) {
      reasons.add("not one reading");
    }
    if (tally.rejections() > 0) {
      reasons.add(tally.rejections() + " refused rows");
    }
    if (without > 0) {
      reasons.add(without + " samples without a series");
    }
    return String.join(", ", reasons);
  }

  private void firstReadings() {
    if (readings.isEmpty()) {
      return;
    }
    out.println();
    out.println("First readings, as understood");
    TextTable table =
        new TextTable(
            "sample",
            "analyte",
            "flask",
            "addition",
            "aliquot",
            "replicate",
            "time",
            "signal",
            "from");
    readings.stream()
        .limit(READINGS_SHOWN)
        .forEach(
            reading ->
                table.add(
                    reading.subject().sample().text(),
                    reading.subject().analyte(),
                    reading.flask(),
                    reading.facts().addition().amount().toString(),
                    reading.facts().aliquot().map(Object::toString).orElse("-"),
                    reading.replicate(),
                    reading.measuredAt().map(this::local).orElse("-"),
                    reading.signal().text(),
                    reading.position().within()));
    table.print(out);
    Reading first = readings.get(0);
    if (!first.flaskMapped()) {
      out.println("No flask is mapped: flasks are told apart by what was added.");
    }
    if (first.measuredAt().isEmpty()) {
      out.println("No time is mapped: the batch is " + first.batch().name() + ".");
    }
  }

  private String local(Instant time) {
    return time.atZone(settings.calendar().zone()).toLocalDateTime().toString();
  }

  /** Shows the series that would form, and returns how many samples form none. */
  private int series() {
    Map<Subject, List<Recorded>> bySubject = new TreeMap<>();
    Instant now = Instant.EPOCH;
    for (Reading reading : readings) {
      bySubject
          .computeIfAbsent(reading.subject(), s -> new ArrayList<>())
          .add(new Recorded(reading, 1, reading.measuredAt().orElse(now), 0));
    }
    Gathering gathering =
        new Gathering(new GatheringRules(settings.calendar(), settings.longestPause()));
    // Long after everything, so that nothing counts as waiting.
    Judge judge = new Judge(settings.criteria(), Instant.MAX, settings.waitForFlasks());
    TextTable table =
        new TextTable(
            "sample",
            "analyte",
            "preparation",
            "design",
            "flasks",
            "additions on the axis",
            "result",
            "unit");
    int shown = 0;
    int without = 0;
    List<Gathered> gathered = new ArrayList<>();
    bySubject.forEach(
        (subject, found) -> gathered.addAll(gathering.gather(subject, newest(found))));
    // An export alone: what earlier nights remember is the ledger's, which is not asked.
    for (Outcome outcome :
        Analysis.of(Fitted.each(gathered), judge, DayFacts.of(settings.criteria()))) {
      without += outcome.result().isEmpty() ? 1 : 0;
      if (shown++ < SERIES_SHOWN || outcome.result().isEmpty()) {
        table.add(line(outcome));
      }
    }
    out.println();
    out.println("Series that would form: " + shown);
    table.print(out);
    return without;
  }

  /** The same identity twice in a file counts once, as in the ledger. */
  private static List<Recorded> newest(List<Recorded> all) {
    Map<List<Object>, Recorded> newest = new LinkedHashMap<>();
    for (Recorded recorded : all) {
      Reading r = recorded.reading();
      newest.put(
          List.of(
              r.measuredAt(),
              r.batch().name(),
              r.facts().preparation().shown(),
              r.flask(),
              r.replicate()),
          recorded);
    }
    return List.copyOf(newest.values());
  }

  private static String[] line(Outcome outcome) {
    Gathered gathered = outcome.gathered();
    Subject subject = gathered.key().subject();
    if (gathered instanceof Ungrouped ungrouped) {
      return new String[] {
        subject.sample().text(),
        subject.analyte(),
        gathered.key().preparation(),
        "none",
        "",
        "",
        ungrouped.found(),
        ""
      };
    }
    AdditionSeries series = (AdditionSeries) gathered;
    List<String> additions =
        series.flasks().stream()
            .map(Flask::x)
            .distinct()
            .map(x -> x == 0 ? "0" : Numbers.rounded(x, 4))
            .toList();
    return new String[] {
      subject.sample().text(),
      subject.analyte(),
      gathered.key().preparation(),
      series.design().word(),
      String.valueOf(series.flasks().size()),
      String.join(" ", additions) + " " + series.axisUnit(),
      outcome.result().map(r -> Numbers.rounded(r.value(), 4)).orElse("none"),
      series.toResult().unit().symbol()
    };
  }

  private void refusals() {
    if (rejections.isEmpty()) {
      return;
    }
    out.println();
    out.println("Refused rows");
    rejections.stream()
        .limit(REFUSALS_SHOWN)
        .forEach(r -> out.println("  " + r.position().within() + ": " + RowsText.why(r)));
    if (rejections.size() > REFUSALS_SHOWN) {
      out.println("  and " + (rejections.size() - REFUSALS_SHOWN) + " more");
    }
  }

  /** Keeps everything: a dry run is for one export, not for a night. */
  private final class Kept implements MappedSink {
    @Override
    public void reading(Reading reading) {
      readings.add(reading);
    }

    @Override
    public void batchReading(BatchReading reading) {
      // Counted in the tally; what it says about the batch stands in the summary.
    }

    @Override
    public void rejection(Rejection rejection) {
      rejections.add(rejection);
    }
  }
}
