package org.spikewright.summary;

import java.util.ArrayList;
import java.util.Comparator;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.stream.IntStream;
import org.spikewright.analysis.BlankResult;
import org.spikewright.analysis.CheckResult;
import org.spikewright.analysis.ControlResult;
import org.spikewright.analysis.DuplicateResult;
import org.spikewright.analysis.Evidence;
import org.spikewright.judgement.Criterion;
import org.spikewright.judgement.Limit;
import org.spikewright.judgement.Verdict;
import org.spikewright.quantity.Numbers;
import org.spikewright.reading.Subject;

/** The night in one screen. */
final class OverviewSheet {
  static final String NAME = "Overview";

  /** How many analytes have a column of their own in the chart. */
  private static final int ANALYTES = 24;

  /** How many findings of the night as a whole it names. */
  private static final int FINDINGS = 8;

  private static final String OTHERS = "all others";

  /** From what is reported, at the bottom of a chart's column, to what is not. */
  private static final List<Verdict> ORDER =
      List.of(Verdict.REPORT, Verdict.REVIEW, Verdict.REPEAT, Verdict.WAITING);

  private static final List<ColumnPlan> COLUMNS =
      IntStream.of(24, 11, 11, 11, 14, 22, 92).mapToObj(w -> ColumnPlan.text("", w)).toList();

  private final Night night;
  private final Counts counts;
  private final SeriesIndex index;
  private final List<List<CellPlan>> rows = new ArrayList<>();

  private OverviewSheet(Night night, Counts counts, SeriesIndex index) {
    this.night = night;
    this.counts = counts;
    this.index = index;
  }

  static SheetPlan of(Night night, Counts counts, SeriesIndex index) {
    return new OverviewSheet(night, counts, index).plan();
  }

  private SheetPlan plan() {
    title();
    verdicts();
    alarms();
    together();
    first();
    flags();
    breakdown("By instrument", counts.instruments());
    Map<String, Map<Verdict, Integer>> analytes = largest(counts.analytes());
    int firstAnalyte = breakdown("By analyte", analytes);
    controls();
    files();
    cautions();
    SheetPlan sheet =
        new SheetPlan(NAME, COLUMNS, List.of(), List.copyOf(rows), SheetPlan.Layout.PAGE);
    return analytes.isEmpty()
        ? sheet
        : sheet.with(List.of(chart(analytes, firstAnalyte)), List.of());
  }

  private void title() {
    String moment =
        night.moment().atZone(night.zone()).toLocalDateTime().toString().substring(0, 16);
    String laboratory = night.laboratory().isEmpty() ? "" : night.laboratory() + " · ";
    row(CellPlan.text("Lab day " + night.labDay(), Look.TITLE));
    row(
        CellPlan.text(
            laboratory
                + "revision "
                + night.revision()
                + " of "
                + moment.replace('T', ' ')
                + " "
                + night.zone(),
            Look.STRONG));
    row(
        CellPlan.text(
            night.inProgress()
                ? "The lab day is still in progress: a later revision will hold more."
                : "The lab day is closed.",
            night.inProgress() ? Look.STRONG : Look.FAINT));
  }

  private void verdicts() {
    heading("Verdicts");
    for (Verdict verdict : ORDER) {
      row(
          CellPlan.text(verdict.word(), Words.look(verdict)),
          CellPlan.count(counts.verdicts().get(verdict)),
          CellPlan.text(Words.meaning(verdict)));
    }
    row(
        CellPlan.text("all series", Look.STRONG),
        new CellPlan.Number(night.seriesCount(), Formats.WHOLE, Look.STRONG));
    blank();
  }

  private void alarms() {
    heading("How far to trust this");
    Limit rate = night.criteria().general().of(Criterion.FALSE_ALARMS);
    double expected = rate.on() ? rate.value() * night.seriesCount() : 0;
    row(CellPlan.text("false alarms expected"), CellPlan.number(expected, "0.0"));
    row(CellPlan.text("statistical flags raised"), CellPlan.count(counts.tested()));
    row(CellPlan.text("intervals from a pool"), CellPlan.count(counts.pooled()));
    row(
        CellPlan.text("live checks that differ"),
        new CellPlan.Formula(
            "COUNTIF('" + SeriesSheet.NAME + "'!B:L,\"" + LiveCells.DIFFERS + "\")",
            CellPlan.count(index.differing())));
    row(
        CellPlan.text(
            rate.on()
                ? "Expected: at most "
                    + Numbers.plain(rate.value())
                    + " a faultless series. Raised: series that are bent, noisy, of odd slope, with"
                    + " an odd flask or level, or a suspected slip."
                : "The statistical tests of single series are switched off.",
            Look.FAINT));
    blank();
  }

  /** What the night's series show together. */
  private void together() {
    heading("The night's series together");
    if (night.evidence().isProvisional()) {
      row(CellPlan.text("Pools provisional: the day is in progress.", Look.STRONG));
    }
    List<String> findings =
        NoiseSheet.of(night, index).stream().flatMap(pool -> pool.findings().stream()).toList();
    findings.stream().limit(FINDINGS).forEach(finding -> row(CellPlan.text(finding)));
    if (findings.size() > FINDINGS) {
      int more = findings.size() - FINDINGS;
      row(CellPlan.text("and " + more + " more: see " + NoiseSheet.NAME, Look.FAINT));
    }
    if (findings.isEmpty()) {
      row(
          CellPlan.text(
              night.evidence().pools().isEmpty()
                  ? "no pools: no series of three flasks or more"
                  : "no bend, level or drift in common; see " + NoiseSheet.NAME));
    }
    blank();
  }

  private void first() {
    heading("Needs a person first");
    if (counts.first().isEmpty()) {
      row(CellPlan.text("nothing"));
    } else {
      header("Sample", "Analyte", "Verdict", "Series", "Instrument", "To report", "Why");
    }
    for (ResultRow result : counts.first()) {
      Subject subject = result.key().subject();
      row(
          CellPlan.text(subject.sample().text()),
          CellPlan.text(subject.analyte()),
          CellPlan.text(result.verdict().word(), Words.look(result.verdict())),
          ResultsSheet.link(result, index),
          CellPlan.text(subject.instrument()),
          CellPlan.text(result.reported()),
          CellPlan.text(why(result), Look.WRAPPED));
    }
    int all = counts.verdicts().get(Verdict.REPEAT) + counts.verdicts().get(Verdict.REVIEW);
    if (all > counts.first().size()) {
      int more = all - counts.first().size();
      row(CellPlan.text("and " + more + " more: see Results", Look.FAINT));
    }
    blank();
  }

  /** The most serious flag's sentence, and how many more there are. */
  private static String why(ResultRow result) {
    int more = result.sentences().size() - 1;
    String first = result.sentences().isEmpty() ? "" : result.sentences().get(0);
    return more > 0 ? first + " (+ " + more + (more == 1 ? " flag)" : " flags)") : first;
  }

  private void flags() {
    heading("By flag");
    if (counts.flags().isEmpty()) {
      row(CellPlan.text("no flags"));
    } else {
      counted("Flag", "Series");
    }
    counts
        .flags()
        .forEach(
            (kind, count) ->
                row(
                    CellPlan.text(kind.shortName()),
                    CellPlan.count(count),
                    CellPlan.text(Words.meaning(kind))));
    blank();
  }

  /** Counts by verdict under a heading; returns the row of the first line, from 1. */
  private int breakdown(String title, Map<String, Map<Verdict, Integer>> lines) {
    heading(title);
    counted("", "report", "review", "repeat", "waiting", "all");
    int firstRow = rows.size() + 1;
    lines.forEach(
        (name, verdicts) -> {
          List<CellPlan> cells = new ArrayList<>();
          cells.add(CellPlan.text(name));
          ORDER.forEach(verdict -> cells.add(CellPlan.count(verdicts.get(verdict))));
          cells.add(CellPlan.count(total(verdicts)));
          rows.add(cells);
        });
    blank();
    return firstRow;
  }

  /** The analytes with most series, then all others as one. */
  private static Map<String, Map<Verdict, Integer>> largest(
      Map<String, Map<Verdict, Integer>> analytes) {
    if (analytes.size() <= ANALYTES) {
      return analytes;
    }
    List<String> names =
        analytes.entrySet().stream()
            .sorted(
                Comparator.comparingInt(
                    (Map.Entry<String, Map<Verdict, Integer>> entry) -> -total(entry.getValue())))
            .map(Map.Entry::getKey)
            .toList();
    Map<String, Map<Verdict, Integer>> shown = new LinkedHashMap<>();
    names.stream().limit(ANALYTES - 1).sorted().forEach(n -> shown.put(n, analytes.get(n)));
    Map<Verdict, Integer> others = Counts.zeros();
    names.stream()
        .skip(ANALYTES - 1)
        .forEach(n -> analytes.get(n).forEach((v, count) -> others.merge(v, count, Integer::sum)));
    shown.put(OTHERS, others);
    return shown;
  }

  private static int total(Map<Verdict, Integer> verdicts) {
    return verdicts.values().stream().mapToInt(Integer::intValue).sum();
  }

  private void controls() {
    heading("Controls");
    Evidence.Found found = night.controls();
    counted("", "in", "out", "not judged");
    counted("controls", found.controls().stream().map(ControlResult::verdict).toList());
    counted("duplicates", found.duplicates().stream().map(DuplicateResult::verdict).toList());
    counted("blanks", found.blanks().stream().map(BlankResult::verdict).toList());
    counted("drift checks", found.checks().stream().map(CheckResult::verdict).toList());
    row(CellPlan.text("see Controls", Look.FAINT));
    blank();
  }

  private void counted(String name, List<ControlResult.Verdict> verdicts) {
    List<CellPlan> cells = new ArrayList<>();
    cells.add(CellPlan.text(name));
    for (ControlResult.Verdict verdict : ControlResult.Verdict.values()) {
      cells.add(CellPlan.count(verdicts.stream().filter(verdict::equals).count()));
    }
    rows.add(cells);
  }

  private void files() {
    heading("Files");
    row(CellPlan.text("read"), CellPlan.count(files("read")));
    row(CellPlan.text("refused"), CellPlan.count(files("refused")), CellPlan.text("see Files"));
    row(CellPlan.text("known already"), CellPlan.count(files("known")));
    row(
        CellPlan.text("rows not used"),
        CellPlan.count(night.files().stream().mapToLong(FileEntry::rejections).sum()),
        CellPlan.text("see Refused rows"));
    blank();
  }

  private long files(String outcome) {
    return night.files().stream().filter(file -> file.outcome().equals(outcome)).count();
  }

  private void cautions() {
    heading("Cautions");
    Cautions.ALL.forEach(caution -> row(CellPlan.text(caution, Look.FAINT)));
  }

  private ChartPlan chart(Map<String, Map<Verdict, Integer>> analytes, int firstRow) {
    int lastRow = firstRow + analytes.size() - 1;
    List<ChartPlan.Part> parts = new ArrayList<>();
    for (Verdict verdict : ORDER) {
      char column = (char) ('B' + ORDER.indexOf(verdict));
      List<Double> cached =
          analytes.values().stream().map(line -> (double) line.get(verdict)).toList();
      parts.add(
          new ChartPlan.Part(
              verdict.word(),
              Words.look(verdict),
              new ChartPlan.Cells(range(column, firstRow, lastRow), cached)));
    }
    return new ChartPlan.StackedColumns(
        "Series by analyte and verdict",
        new ChartPlan.Box(6, 0, 7, 15),
        range('A', firstRow, lastRow),
        List.copyOf(analytes.keySet()),
        parts);
  }

  private static String range(char column, int first, int last) {
    return "'" + NAME + "'!$" + column + "$" + first + ":$" + column + "$" + last;
  }

  private void heading(String text) {
    row(CellPlan.text(text, Look.HEADING));
  }

  private void header(String... titles) {
    List<CellPlan> cells = new ArrayList<>();
    for (String title : titles) {
      cells.add(new CellPlan.Text(title, Look.HEADER));
    }
    rows.add(cells);
  }

  /** A header whose first column holds words and the others numbers. */
  private void counted(String first, String... others) {
    List<CellPlan> cells = new ArrayList<>();
    cells.add(new CellPlan.Text(first, Look.HEADER));
    for (String title : others) {
      cells.add(new CellPlan.Text(title, Look.HEADER_RIGHT));
    }
    rows.add(cells);
  }

  private void blank() {
    rows.add(List.of());
  }

  private void row(CellPlan... cells) {
    rows.add(List.of(cells));
  }
}
