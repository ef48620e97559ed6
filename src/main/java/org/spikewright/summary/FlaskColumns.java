package org.spikewright.summary;

import java.util.ArrayList;
import java.util.Collections;
import java.util.Comparator;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.OptionalDouble;
import java.util.TreeMap;
import org.spikewright.judgement.Outcome;
import org.spikewright.quantity.Numbers;
import org.spikewright.quantity.Quantity;
import org.spikewright.reading.Addition;
import org.spikewright.reading.Reading;
import org.spikewright.reading.Recorded;
import org.spikewright.reading.Subject;
import org.spikewright.series.AdditionSeries;
import org.spikewright.series.Flask;
import org.spikewright.series.SeriesKey;
import org.spikewright.series.Ungrouped;

/** The columns of the flasks file, in order, and the flasks of a series as their fields. */
public final class FlaskColumns {

  /** The names, in order; stable, and new ones come last. */
  public static final List<String> NAMES =
      List.of(
          "lab_day",
          "batch",
          "sample",
          "analyte",
          "instrument",
          "flask",
          "addition",
          "addition_unit",
          "x",
          "x_unit",
          "mean_signal",
          "replicate_sd",
          "readings",
          "volume_factor",
          "signal_used",
          "fitted",
          "residual",
          "used",
          "why_not",
          "source_files",
          "source_cells",
          "line",
          "preparation",
          "series",
          "stock");

  private FlaskColumns() {}

  /** One list of fields a flask; readings that form no series are gathered by flask label. */
  public static List<List<String>> lines(Outcome outcome) {
    return outcome.gathered() instanceof AdditionSeries series
        ? lines(series, FlaskLine.of(outcome))
        : ungrouped((Ungrouped) outcome.gathered());
  }

  private static List<List<String>> lines(AdditionSeries series, List<FlaskLine> flasks) {
    List<List<String>> lines = new ArrayList<>(flasks.size());
    for (FlaskLine flask : flasks) {
      lines.add(fields(series, flask));
    }
    return lines;
  }

  private static List<String> fields(AdditionSeries series, FlaskLine line) {
    Flask flask = line.flask();
    List<String> fields = whose(series.key(), series.batchName());
    addition(fields, flask.label(), flask.facts().addition());
    add(fields, Numbers.plain(line.x().orElse(flask.x())), series.axisUnit().symbol());
    add(fields, number(flask.meanSignal()), number(flask.replicateSd()));
    add(fields, Integer.toString(flask.numbers()), number(flask.volumeFactor()));
    add(fields, ResultColumns.number(line.signal()), ResultColumns.number(line.fitted()));
    add(fields, ResultColumns.number(line.residual()), line.used() ? "yes" : "no");
    add(fields, line.used() ? "" : line.remark());
    add(fields, ResultColumns.join(line.files()), ResultColumns.join(line.cells()));
    identity(fields, series.key(), flask.facts().addition());
    return fields;
  }

  private static List<List<String>> ungrouped(Ungrouped ungrouped) {
    Map<String, List<Reading>> flasks = new LinkedHashMap<>();
    for (Recorded recorded : ungrouped.readings()) {
      flasks
          .computeIfAbsent(recorded.reading().flask(), flask -> new ArrayList<>())
          .add(recorded.reading());
    }
    List<List<String>> lines = new ArrayList<>();
    new TreeMap<>(flasks).forEach((flask, readings) -> lines.add(line(ungrouped, flask, readings)));
    return lines;
  }

  private static List<String> line(Ungrouped ungrouped, String flask, List<Reading> readings) {
    Addition addition = readings.get(0).facts().addition();
    List<String> fields = whose(ungrouped.key(), ungrouped.batchName());
    addition(fields, flask, addition);
    add(fields, "", "", "", "", Integer.toString(readings.size()), "", "", "", "", "no");
    add(fields, "no series: " + ungrouped.found());
    add(
        fields,
        ResultColumns.join(
            readings.stream()
                .map(reading -> reading.position().source().file())
                .distinct()
                .sorted(Comparator.naturalOrder())
                .toList()),
        ResultColumns.join(
            readings.stream().map(reading -> reading.position().within()).distinct().toList()));
    identity(fields, ungrouped.key(), addition);
    return fields;
  }

  private static List<String> whose(SeriesKey key, String batch) {
    List<String> fields = new ArrayList<>(NAMES.size());
    Subject subject = key.subject();
    add(fields, key.labDay().toString(), batch, subject.sample().text(), subject.analyte());
    add(fields, subject.instrument());
    return fields;
  }

  private static void addition(List<String> fields, String flask, Addition addition) {
    Quantity amount = addition.amount();
    add(fields, flask, Numbers.plain(amount.value()), amount.unit().symbol());
  }

  private static void identity(List<String> fields, SeriesKey key, Addition addition) {
    String stock = addition instanceof Addition.OfStock spike ? spike.stock().toString() : "";
    add(fields, key.subject().line(), key.preparation(), Integer.toString(key.ordinal()), stock);
  }

  private static String number(double value) {
    OptionalDouble finite = FlaskLine.finite(value);
    return ResultColumns.number(finite);
  }

  private static void add(List<String> fields, String... more) {
    Collections.addAll(fields, more);
  }
}
