package org.spikewright.summary;

import java.util.ArrayList;
import java.util.Comparator;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.function.Consumer;
import java.util.function.Function;
import java.util.stream.Collectors;
import org.spikewright.analysis.Agreement;
import org.spikewright.analysis.BlankResult;
import org.spikewright.analysis.CheckResult;
import org.spikewright.analysis.ControlResult;
import org.spikewright.analysis.ControlResult.Verdict;
import org.spikewright.analysis.DuplicateResult;
import org.spikewright.analysis.Evidence;
import org.spikewright.analysis.LinesBeside;
import org.spikewright.analysis.MatrixEffect;
import org.spikewright.fit.ControlLimits;
import org.spikewright.quantity.Estimate;
import org.spikewright.quantity.Numbers;
import org.spikewright.reading.CheckReading;
import org.spikewright.reading.Signal;
import org.spikewright.reading.Subject;

/** What the night's series, blanks, checks and controls say about each other. */
final class ControlsSheet {
  static final String NAME = "Controls";

  /** How many lines each part has. */
  private static final int MOST = 200;

  private static final String PERCENT = "0.0%";

  /** What each column holds in most parts; the parts have headers of their own. */
  private enum At {
    NAME(24),
    KIND(18),
    SAMPLE(18),
    ANALYTE(9),
    LINE(9),
    INSTRUMENT(13),
    BATCH(15),
    VERDICT(11),
    FOUND(11),
    UNIT(8),
    U(9),
    KNOWN(11),
    RATIO(11),
    Z(9),
    EN(9),
    LOWER(10),
    UPPER(10),
    FROM(36),
    CHART(36),
    REMARK(46);

    private final int width;

    At(int width) {
      this.width = width;
    }
  }

  private static final List<ColumnPlan> COLUMNS =
      java.util.Arrays.stream(At.values()).map(at -> ColumnPlan.text("", at.width)).toList();

  private final Evidence.Found found;
  private final List<List<CellPlan>> rows = new ArrayList<>();

  private ControlsSheet(Evidence.Found found) {
    this.found = found;
  }

  static SheetPlan of(Night night) {
    return new ControlsSheet(night.controls()).plan();
  }

  private SheetPlan plan() {
    rows.add(List.of(CellPlan.text("Controls", Look.TITLE)));
    rows.add(List.of(CellPlan.text(sentence(), Look.FAINT)));
    rows.add(List.of());
    controls();
    duplicates();
    blanks();
    checks();
    matrixEffects();
    agreements();
    lines();
    ControlCharts charts = ControlCharts.of(found, rows.size());
    rows.addAll(charts.rows());
    SheetPlan sheet =
        new SheetPlan(NAME, COLUMNS, List.of(), List.copyOf(rows), SheetPlan.Layout.PAGE);
    return charts.charts().isEmpty() ? sheet : sheet.with(charts.charts(), List.of());
  }

  private static String sentence() {
    return "A control that is out brings the series of its batch (same instrument, batch, analyte"
        + " and line) to review. Limits of a chart come from earlier lab days and judge from "
        + ControlLimits.ENOUGH
        + " points on; until then they are provisional.";
  }

  private void controls() {
    part(
        "Control samples, reference materials, spiked controls",
        "no control",
        found.controls(),
        Comparator.comparing(control -> control.verdict() != Verdict.OUT),
        header("Control", "Kind", "Found", "Known", "Recovery", "z", "E_n"),
        this::control);
  }

  private List<CellPlan> control(ControlResult control) {
    String format = format(control.value().orElse(0), control.standardUncertainty());
    // The limits are on the chart's scale: of a spiked control they are recoveries.
    String limit = control.plottedUnit().equals("1") ? PERCENT : format;
    Cells cells = new Cells();
    cells.subject(control.series().subject(), control.batch());
    cells.text(At.NAME, control.key().name());
    cells.text(At.KIND, control.key().kind().word());
    cells.verdict(control.verdict());
    cells.number(At.FOUND, control.value(), format);
    cells.text(At.UNIT, control.unit());
    cells.number(At.U, control.standardUncertainty(), format);
    cells.number(At.KNOWN, control.reference(), format);
    cells.number(At.RATIO, control.recovery(), PERCENT);
    cells.number(At.Z, control.z(), "0.00");
    cells.number(At.EN, control.en(), "0.00");
    cells.number(At.LOWER, control.lower(), limit);
    cells.number(At.UPPER, control.upper(), limit);
    cells.text(At.FROM, control.limitsFrom());
    cells.text(At.CHART, chart(control.chart()));
    cells.text(At.REMARK, control.words());
    return cells.row();
  }

  static String chart(Optional<ControlLimits> chart) {
    return chart
        .map(
            limits ->
                Numbers.roundedLike(limits.lowerAction(), limits.sd(), 2)
                    + " to "
                    + Numbers.roundedLike(limits.upperAction(), limits.sd(), 2)
                    + (limits.provisional() ? ", provisional, from " : " from ")
                    + limits.points()
                    + " points")
        .orElse("none yet");
  }

  private void duplicates() {
    part(
        "Duplicates",
        "no duplicate",
        found.duplicates(),
        Comparator.comparing(duplicate -> duplicate.verdict() != Verdict.OUT),
        header("Rule", "", "Found", "Original", "Difference", "", ""),
        this::duplicate);
  }

  private List<CellPlan> duplicate(DuplicateResult duplicate) {
    String format = Formats.significant(duplicate.value(), 4);
    Cells cells = new Cells();
    cells.subject(duplicate.series().subject(), duplicate.batch());
    cells.text(At.NAME, duplicate.name());
    cells.verdict(duplicate.verdict());
    cells.number(At.FOUND, OptionalDouble.of(duplicate.value()), format);
    cells.text(At.UNIT, duplicate.unit());
    cells.number(At.KNOWN, duplicate.originalValue(), format);
    cells.number(At.RATIO, duplicate.difference(), PERCENT);
    cells.number(At.UPPER, duplicate.limit(), PERCENT);
    cells.text(
        At.REMARK,
        duplicate.originalValue().isPresent()
            ? "of " + duplicate.original()
            : "the night has no result of " + duplicate.original());
    return cells.row();
  }

  private void blanks() {
    part(
        "Blanks",
        "no blank",
        found.blanks(),
        Comparator.comparing(blank -> blank.verdict() != Verdict.OUT),
        header("Blank", "", "Found", "", "", "", ""),
        this::blank);
  }

  private List<CellPlan> blank(BlankResult blank) {
    String format = format(blank.value(), blank.standardUncertainty());
    Cells cells = new Cells();
    cells.subject(blank.series().subject(), blank.batch());
    cells.text(At.NAME, blank.key().name());
    cells.verdict(blank.verdict());
    cells.number(At.FOUND, OptionalDouble.of(blank.value()), format);
    cells.text(At.UNIT, blank.unit());
    cells.number(At.U, blank.standardUncertainty(), format);
    cells.number(At.UPPER, blank.most(), format);
    cells.text(At.CHART, chart(found.history().limits(blank.key(), blank.unit())));
    cells.text(At.REMARK, blank.detected() ? "" : "not detected");
    return cells.row();
  }

  private void checks() {
    part(
        "Drift checks",
        "no drift check",
        found.checks(),
        Comparator.comparing(check -> check.verdict() != Verdict.OUT),
        header("", "Readings", "First", "Last", "Largest change", "", ""),
        this::check);
  }

  private List<CellPlan> check(CheckResult check) {
    List<CheckReading> readings = check.readings();
    double first = signal(readings.get(0));
    Cells cells = new Cells();
    cells.subject(check.subject(), check.batch());
    cells.at(At.KIND, CellPlan.count(readings.size()));
    cells.verdict(check.verdict());
    cells.number(At.FOUND, OptionalDouble.of(first), Formats.significant(first, 4));
    cells.number(
        At.KNOWN,
        OptionalDouble.of(signal(readings.get(readings.size() - 1))),
        Formats.significant(first, 4));
    cells.number(At.RATIO, check.worst(), "+0.0%;-0.0%;0.0%");
    cells.number(At.UPPER, OptionalDouble.of(check.limit()), PERCENT);
    return cells.row();
  }

  private static double signal(CheckReading reading) {
    return ((Signal.Value) reading.signal()).value();
  }

  private void matrixEffects() {
    part(
        "Matrix effect: sensitivity in the sample over that of the external calibration",
        "no external calibration",
        found.matrixEffects(),
        Comparator.comparing(effect -> -Math.abs(effect.comparison().ratio() - 1)),
        Map.of(
            At.FOUND, "In sample",
            At.UNIT, "per",
            At.KNOWN, "External",
            At.RATIO, "Ratio",
            At.Z, "p",
            At.LOWER, "95 % from",
            At.UPPER, "95 % to",
            At.FROM, "Matrix effect",
            At.CHART, "Calibration"),
        this::matrixEffect);
  }

  private List<CellPlan> matrixEffect(MatrixEffect effect) {
    Cells cells = new Cells();
    cells.subject(effect.series().subject(), effect.batch());
    String format = Formats.significant(effect.external(), 4);
    cells.number(At.FOUND, OptionalDouble.of(effect.inSample()), format);
    cells.text(At.UNIT, effect.unit());
    cells.number(At.KNOWN, OptionalDouble.of(effect.external()), format);
    cells.number(At.RATIO, OptionalDouble.of(effect.comparison().ratio()), PERCENT);
    cells.number(At.Z, OptionalDouble.of(effect.comparison().p()), "0.000");
    cells.number(At.LOWER, effect.comparison().lower95(), PERCENT);
    cells.number(At.UPPER, effect.comparison().upper95(), PERCENT);
    cells.text(At.FROM, effect.words());
    cells.text(
        At.CHART,
        effect.solutions()
            + (effect.throughOrigin() ? " solutions, through the origin" : " solutions, a line"));
    return cells.row();
  }

  private void agreements() {
    part(
        "Several series of one sample, each weighted by its uncertainty",
        "no sample with several series",
        found.agreements(),
        Comparator.comparing(agreement -> agreement.combination().p()),
        Map.of(
            At.KIND, "Series",
            At.FOUND, "Combined",
            At.UNIT, "Unit",
            At.U, "u",
            At.Z, "Chi-square",
            At.EN, "p",
            At.FROM, "Results",
            At.CHART, "Preparations"),
        this::agreement);
  }

  private List<CellPlan> agreement(Agreement agreement) {
    Estimate combined = agreement.combination().cautious();
    double u = combined.standardUncertainty();
    String format = format(combined.value(), OptionalDouble.of(u));
    Cells cells = new Cells();
    cells.subject(agreement.series().get(0).subject(), "");
    cells.at(At.KIND, CellPlan.count(agreement.series().size()));
    cells.at(
        At.VERDICT,
        agreement.agree()
            ? CellPlan.text("agree", Look.REPORT)
            : CellPlan.text("disagree", Look.REVIEW));
    cells.number(At.FOUND, OptionalDouble.of(combined.value()), format);
    cells.text(At.UNIT, agreement.unit());
    cells.number(At.U, OptionalDouble.of(u), format);
    cells.number(At.Z, OptionalDouble.of(agreement.combination().chiSquare()), "0.00");
    cells.number(At.EN, OptionalDouble.of(agreement.combination().p()), "0.000");
    cells.text(
        At.FROM,
        agreement.values().stream()
            .map(value -> Numbers.rounded(value, 4))
            .collect(Collectors.joining("; ")));
    cells.text(
        At.CHART,
        agreement.series().stream()
            .map(key -> key.preparation().isEmpty() ? "as received" : key.preparation())
            .distinct()
            .collect(Collectors.joining("; ")));
    return cells.row();
  }

  private record OneLine(LinesBeside all, LinesBeside.OfLine line) {}

  private void lines() {
    List<OneLine> each =
        found.lines().stream()
            .sorted(Comparator.comparing(all -> -all.spread().orElse(Double.MAX_VALUE)))
            .flatMap(all -> all.lines().stream().map(line -> new OneLine(all, line)))
            .toList();
    part(
        "Lines of one element side by side (of the same flasks, so never combined)",
        "no element at several lines",
        each,
        (a, b) -> 0,
        Map.of(At.FOUND, "Found", At.UNIT, "Unit", At.U, "u", At.RATIO, "Spread"),
        this::line);
  }

  private List<CellPlan> line(OneLine one) {
    String format = format(one.line().value(), one.line().standardUncertainty());
    Cells cells = new Cells();
    cells.subject(one.line().series().subject(), "");
    cells.number(At.FOUND, OptionalDouble.of(one.line().value()), format);
    cells.text(At.UNIT, one.all().unit());
    cells.number(At.U, one.line().standardUncertainty(), format);
    if (one.all().lines().get(0).equals(one.line())) {
      cells.number(At.RATIO, one.all().spread(), PERCENT);
    }
    return cells.row();
  }

  private static String format(double value, OptionalDouble uncertainty) {
    return uncertainty.isPresent() && uncertainty.getAsDouble() > 0
        ? Formats.significant(uncertainty.getAsDouble(), 2)
        : Formats.significant(value, 4);
  }

  private static Map<At, String> header(
      String name, String kind, String value, String known, String ratio, String z, String en) {
    return Map.ofEntries(
        Map.entry(At.NAME, name),
        Map.entry(At.KIND, kind),
        Map.entry(At.FOUND, value),
        Map.entry(At.UNIT, value.equals("First") ? "" : "Unit"),
        Map.entry(At.U, value.equals("Found") && !known.equals("Original") ? "u" : ""),
        Map.entry(At.KNOWN, known),
        Map.entry(At.RATIO, ratio),
        Map.entry(At.Z, z),
        Map.entry(At.EN, en),
        Map.entry(At.LOWER, z.isEmpty() ? "" : "Limit from"),
        Map.entry(At.UPPER, z.isEmpty() ? "Limit" : "Limit to"),
        Map.entry(At.FROM, z.isEmpty() ? "" : "Limits from"),
        Map.entry(At.CHART, known.isEmpty() || !z.isEmpty() ? "Limits of its chart" : ""),
        Map.entry(At.REMARK, "Remark"));
  }

  /** One part of the sheet: what is out first, cut with a sentence. */
  private <T> void part(
      String title,
      String none,
      List<T> all,
      Comparator<T> worstFirst,
      Map<At, String> header,
      Function<T, List<CellPlan>> line) {
    rows.add(List.of(CellPlan.text(title, Look.HEADING)));
    if (all.isEmpty()) {
      rows.add(List.of(CellPlan.text(none)));
      rows.add(List.of());
      return;
    }
    Cells titles = new Cells();
    Consumer<Map.Entry<At, String>> set =
        entry ->
            titles.at(
                entry.getKey(),
                new CellPlan.Text(
                    entry.getValue(), isNumber(entry) ? Look.HEADER_RIGHT : Look.HEADER));
    Map.of(
            At.SAMPLE, "Sample",
            At.ANALYTE, "Analyte",
            At.LINE, "Line",
            At.INSTRUMENT, "Instrument",
            At.BATCH, "Batch",
            At.VERDICT, "Verdict")
        .entrySet()
        .forEach(set);
    header.entrySet().forEach(set);
    rows.add(titles.headerRow());
    all.stream().sorted(worstFirst).limit(MOST).map(line).forEach(rows::add);
    if (all.size() > MOST) {
      int more = all.size() - MOST;
      rows.add(List.of(CellPlan.text("and " + more + " more, less serious ones", Look.FAINT)));
    }
    rows.add(List.of());
  }

  private static boolean isNumber(Map.Entry<At, String> title) {
    return switch (title.getKey()) {
      case KIND -> !title.getValue().equals("Kind");
      case FOUND, U, KNOWN, RATIO, Z, EN, LOWER, UPPER -> true;
      default -> false;
    };
  }

  /** The cells of one row. */
  private static final class Cells {
    private final CellPlan[] cells = new CellPlan[At.values().length];

    void at(At at, CellPlan cell) {
      cells[at.ordinal()] = cell;
    }

    void text(At at, String text) {
      at(at, CellPlan.text(text, at == At.REMARK ? Look.WRAPPED : Look.PLAIN));
    }

    void number(At at, OptionalDouble value, String format) {
      at(at, CellPlan.number(value, format));
    }

    void subject(Subject subject, String batch) {
      text(At.SAMPLE, subject.sample().text());
      text(At.ANALYTE, subject.analyte());
      text(At.LINE, subject.line());
      text(At.INSTRUMENT, subject.instrument());
      text(At.BATCH, batch);
    }

    void verdict(Verdict verdict) {
      Look look =
          switch (verdict) {
            case IN -> Look.REPORT;
            case OUT -> Look.REVIEW;
            case NOT_JUDGED -> Look.PLAIN;
          };
      at(At.VERDICT, CellPlan.text(verdict.word(), look));
    }

    List<CellPlan> row() {
      return filled(CellPlan.EMPTY);
    }

    /** Columns that this part does not use have no title, but the band goes through. */
    List<CellPlan> headerRow() {
      return filled(new CellPlan.Text("", Look.HEADER));
    }

    private List<CellPlan> filled(CellPlan otherwise) {
      List<CellPlan> row = new ArrayList<>();
      for (CellPlan cell : cells) {
        row.add(cell == null ? otherwise : cell);
      }
      return List.copyOf(row);
    }
  }
}
