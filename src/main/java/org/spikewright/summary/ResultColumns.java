package org.spikewright.summary;

import java.time.LocalDate;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.Collections;
import java.util.List;
import java.util.OptionalDouble;
import java.util.OptionalInt;
import org.spikewright.judgement.Verdict;
import org.spikewright.quantity.Numbers;
import org.spikewright.reading.SampleId;
import org.spikewright.reading.Subject;
import org.spikewright.series.SeriesKey;

/**
 * The columns of the results file, in order, and a result as its fields and back.
 *
 * <p>Numbers carry full precision: they read back as the same double. An empty field means that
 * there is no such number. A field with several items separates them by {@code ;}; within an item
 * {@code ;} is written {@code \;} and {@code \} is written {@code \\}.
 */
public final class ResultColumns {

  /** The names, in order; stable, and new ones come last. */
  public static final List<String> NAMES =
      List.of(
          "lab_day",
          "batch",
          "sample",
          "analyte",
          "value",
          "unit",
          "reported",
          "standard_uncertainty",
          "expanded_uncertainty",
          "coverage_factor",
          "lower95",
          "upper95",
          "own_standard_error",
          "own_lower95",
          "own_upper95",
          "interval_basis",
          "detection_limit",
          "verdict",
          "flags",
          "flasks",
          "readings",
          "slope",
          "signal_intercept",
          "residual_sd",
          "residual_df",
          "r",
          "design",
          "instrument",
          "preparation",
          "source_files",
          "line",
          "role",
          "series",
          "delimiting_batch",
          "sentences",
          "pool",
          "pool_series",
          "pool_standard_error",
          "pool_lower95",
          "pool_upper95",
          "pool_df",
          "bend_p",
          "bent_value",
          "bend_allowance",
          "drift_exposure",
          "effective_df",
          "contributions");

  private ResultColumns() {}

  /** A result's fields, as many as there are names. */
  public static List<String> fields(ResultRow row) {
    List<String> fields = new ArrayList<>(NAMES.size());
    SeriesKey key = row.key();
    Subject subject = key.subject();
    add(fields, key.labDay().toString(), row.batch(), subject.sample().text(), subject.analyte());
    add(fields, number(row.value()), row.unit(), row.reported());
    add(fields, number(row.standardUncertainty()), number(row.expandedUncertainty()));
    add(fields, number(row.coverageFactor()), number(row.lower95()), number(row.upper95()));
    add(fields, number(row.ownStandardError()), number(row.ownLower95()));
    add(fields, number(row.ownUpper95()), row.intervalBasis(), number(row.detectionLimit()));
    add(fields, row.verdict().word(), join(row.flags()));
    add(fields, Integer.toString(row.flasks()), Integer.toString(row.readings()));
    add(fields, number(row.slope()), number(row.signalIntercept()), number(row.residualSd()));
    OptionalInt df = row.residualDf();
    add(fields, df.isPresent() ? Integer.toString(df.getAsInt()) : "", number(row.r()));
    add(fields, row.design(), subject.instrument(), key.preparation(), join(row.sourceFiles()));
    add(fields, subject.line(), row.role(), Integer.toString(key.ordinal()));
    add(fields, key.batch(), join(row.sentences()));
    RowEvidence evidence = row.evidence();
    String lenders = evidence.poolSeries() == 0 ? "" : Integer.toString(evidence.poolSeries());
    add(fields, evidence.pool(), lenders, number(evidence.poolStandardError()));
    add(fields, number(evidence.poolLower95()), number(evidence.poolUpper95()));
    add(fields, number(evidence.poolDf()), number(evidence.bendP()), number(evidence.bentValue()));
    add(fields, number(evidence.bendAllowance()), number(evidence.driftExposure()));
    add(fields, number(evidence.effectiveDf()), join(evidence.contributions()));
    return fields;
  }

  /**
   * A result from its fields.
   *
   * @throws IllegalArgumentException when they are not as {@link #fields} makes them
   */
  public static ResultRow row(List<String> fields) {
    if (fields.size() != NAMES.size()) {
      throw new IllegalArgumentException(fields.size() + " fields, not " + NAMES.size());
    }
    Subject subject =
        new Subject(fields.get(27), new SampleId(fields.get(2)), fields.get(3), fields.get(30));
    SeriesKey key =
        new SeriesKey(
            LocalDate.parse(fields.get(0)),
            subject,
            fields.get(33),
            fields.get(28),
            Integer.parseInt(fields.get(32)));
    String df = fields.get(24);
    return new ResultRow(
        key,
        fields.get(1),
        fields.get(31),
        number(fields.get(4)),
        fields.get(5),
        fields.get(6),
        number(fields.get(7)),
        number(fields.get(8)),
        number(fields.get(9)),
        number(fields.get(10)),
        number(fields.get(11)),
        number(fields.get(12)),
        number(fields.get(13)),
        number(fields.get(14)),
        fields.get(15),
        number(fields.get(16)),
        verdict(fields.get(17)),
        split(fields.get(18)),
        split(fields.get(34)),
        Integer.parseInt(fields.get(19)),
        Integer.parseInt(fields.get(20)),
        number(fields.get(21)),
        number(fields.get(22)),
        number(fields.get(23)),
        df.isEmpty() ? OptionalInt.empty() : OptionalInt.of(Integer.parseInt(df)),
        number(fields.get(25)),
        fields.get(26),
        split(fields.get(29)),
        evidence(fields));
  }

  private static RowEvidence evidence(List<String> fields) {
    String lenders = fields.get(36);
    return new RowEvidence(
        fields.get(35),
        lenders.isEmpty() ? 0 : Integer.parseInt(lenders),
        number(fields.get(37)),
        number(fields.get(38)),
        number(fields.get(39)),
        number(fields.get(40)),
        number(fields.get(41)),
        number(fields.get(42)),
        number(fields.get(43)),
        number(fields.get(44)),
        number(fields.get(45)),
        split(fields.get(46)));
  }

  /** Items in one field; none of them empty. */
  static String join(List<String> items) {
    StringBuilder field = new StringBuilder();
    for (String item : items) {
      field.append(field.isEmpty() ? "" : ";");
      for (int i = 0; i < item.length(); i++) {
        char c = item.charAt(i);
        if (c == ';' || c == '\\') {
          field.append('\\');
        }
        field.append(c);
      }
    }
    return field.toString();
  }

  /** The items of a field. */
  static List<String> split(String field) {
    List<String> items = new ArrayList<>();
    StringBuilder item = new StringBuilder();
    for (int i = 0; i < field.length(); i++) {
      char c = field.charAt(i);
      if (c == '\\' && i + 1 < field.length()) {
        item.append(field.charAt(++i));
      } else if (c == ';') {
        items.add(item.toString());
        item.setLength(0);
      } else {
        item.append(c);
      }
    }
    if (!item.isEmpty()) {
      items.add(item.toString());
    }
    return List.copyOf(items);
  }

  static String number(OptionalDouble value) {
    return value.isPresent() ? Numbers.plain(value.getAsDouble()) : "";
  }

  private static OptionalDouble number(String field) {
    return field.isEmpty() ? OptionalDouble.empty() : OptionalDouble.of(Double.parseDouble(field));
  }

  private static Verdict verdict(String word) {
    return Arrays.stream(Verdict.values())
        .filter(verdict -> verdict.word().equals(word))
        .findFirst()
        .orElseThrow(() -> new IllegalArgumentException("no verdict '" + word + "'"));
  }

  private static void add(List<String> fields, String... more) {
    Collections.addAll(fields, more);
  }
}
