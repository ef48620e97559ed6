package org.spikewright.testkit;

import java.time.Duration;
import java.time.Instant;
import java.time.LocalDate;
import java.time.LocalTime;
import java.time.ZoneId;
import java.util.ArrayList;
import java.util.Comparator;
import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.Random;
import org.spikewright.analysis.Analysis;
import org.spikewright.analysis.ControlBook;
import org.spikewright.analysis.ControlHistory;
import org.spikewright.analysis.DayFacts;
import org.spikewright.analysis.Evidence;
import org.spikewright.analysis.Fitted;
import org.spikewright.analysis.NightEvidence;
import org.spikewright.analysis.Recall;
import org.spikewright.judgement.CriteriaBook;
import org.spikewright.judgement.Judge;
import org.spikewright.judgement.Outcome;
import org.spikewright.judgement.Verdict;
import org.spikewright.quantity.Measured;
import org.spikewright.quantity.Numbers;
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
import org.spikewright.reading.Recorded;
import org.spikewright.reading.Role;
import org.spikewright.reading.SampleId;
import org.spikewright.reading.Signal;
import org.spikewright.reading.Subject;
import org.spikewright.series.Gathered;
import org.spikewright.series.Gathering;
import org.spikewright.series.GatheringRules;
import org.spikewright.summary.FileEntry;
import org.spikewright.summary.Night;
import org.spikewright.summary.RefusedRow;
import org.spikewright.summary.ResultRow;
import org.spikewright.summary.Setting;
import org.spikewright.table.Position;
import org.spikewright.table.Source;

/** Nights of an imaginary laboratory, gathered and judged as the program does it. */
public final class Nights {
  /** The lab day of every night. */
  public static final LocalDate LAB_DAY = LocalDate.of(2025, 1, 15);

  /** The laboratory's zone. */
  public static final ZoneId ZONE = ZoneId.of("Europe/Lisbon");

  /** The moment of the revision. */
  public static final Instant MOMENT = Instant.parse("2025-01-16T06:30:00Z");

  private static final Instant START = Instant.parse("2025-01-15T09:00:00Z");
  private static final Unit UG_PER_L = Unit.of("µg/L");
  private static final Unit MG_PER_L = Unit.of("mg/L");
  private static final Unit MG_PER_KG = Unit.of("mg/kg");
  private static final Unit ML = Unit.of("mL");
  private static final Unit UL = Unit.of("µL");

  private static final GatheringRules RULES =
      new GatheringRules(new LabCalendar(ZONE, LocalTime.of(6, 0)), Duration.ofHours(4));
  private static final Judge JUDGE =
      new Judge(CriteriaBook.defaults(), MOMENT, Duration.ofHours(12));

  private Nights() {}

  /** A night with one of each: every verdict, no series, awkward names. */
  public static Night small() {
    List<Outcome> outcomes = new ArrayList<>();
    outcomes.add(water("BW-0412", "Pb", 12.4, Shape.STRAIGHT));
    outcomes.add(water("BW-0413", "Pb", 14.2, Shape.BENT));
    outcomes.add(water("BW-0414", "Pb", 8.1, Shape.ODD));
    outcomes.add(water("BW-0415", "Cd", 0.01, Shape.STRAIGHT));
    outcomes.add(water("BW-0416", "Cd", 6.3, Shape.OVER_RANGE));
    outcomes.add(water("=1+1", "Cd", 5.2, Shape.STRAIGHT));
    outcomes.add(water("007", "Zn", 22.0, Shape.STRAIGHT));
    outcomes.add(water("-2", "Zn", 17.5, Shape.TWO_FLASKS));
    outcomes.add(water("@sump", "Zn", 9.9, Shape.SCATTERED));
    outcomes.add(water("BW-0420", "Zn", 9.9, Shape.WAITING));
    outcomes.add(sediment("Mudflat 3", "Pb"));
    outcomes.add(ungrouped("BW-0421", "Cd"));
    return night(outcomes, files(), refused());
  }

  /** A night of so many series, most of them fit to be reported. */
  public static Night large(int series) {
    String[] analytes = {"As", "Cd", "Co", "Cr", "Cu", "Mn", "Ni", "Pb", "Sb", "Zn"};
    List<Outcome> outcomes = new ArrayList<>(series);
    for (int i = 0; i < series; i++) {
      Shape shape = i % 23 == 0 ? Shape.BENT : i % 37 == 0 ? Shape.ODD : Shape.STRAIGHT;
      String sample = String.format(java.util.Locale.ROOT, "BW-%05d", i / analytes.length);
      outcomes.add(water(sample, analytes[i % analytes.length], 5 + i % 17, shape));
    }
    return night(outcomes, files(), refused());
  }

  /** A night without anything. */
  public static Night empty() {
    return night(List.of(), List.of(), List.of());
  }

  /** A night of these outcomes. */
  public static Night night(
      List<Outcome> outcomes, List<FileEntry> files, Iterable<RefusedRow> refused) {
    return night(outcomes, files, refused, NightEvidence.NONE);
  }

  private static Night night(
      List<Outcome> outcomes,
      List<FileEntry> files,
      Iterable<RefusedRow> refused,
      NightEvidence evidence) {
    List<Outcome> byKey =
        outcomes.stream().sorted(Comparator.comparing(o -> o.gathered().key())).toList();
    List<ResultRow> rows =
        byKey.stream()
            .map(ResultRow::of)
            .sorted(Comparator.comparing(row -> urgency(row.verdict())))
            .toList();
    return new Night(
        LAB_DAY,
        1,
        MOMENT,
        evidence.isProvisional(),
        ZONE,
        "Brackwater Trace Laboratory",
        rows.size(),
        rows,
        byKey,
        files,
        refused,
        settings(),
        CriteriaBook.defaults(),
        evidence,
        Evidence.NONE.found());
  }

  /** The small night with what its series say about each other. */
  public static Night with(Evidence.Found evidence) {
    Night night = small();
    return new Night(
        night.labDay(),
        night.revision(),
        night.moment(),
        night.inProgress(),
        night.zone(),
        night.laboratory(),
        night.seriesCount(),
        night.results(),
        night.outcomes(),
        night.files(),
        night.refused(),
        night.settings(),
        night.criteria(),
        night.evidence(),
        evidence);
  }

  private static int urgency(Verdict verdict) {
    return switch (verdict) {
      case REPEAT -> 0;
      case REVIEW -> 1;
      case WAITING -> 2;
      case REPORT -> 3;
    };
  }

  /** What is the matter with a series. */
  public enum Shape {
    STRAIGHT,
    BENT,
    ODD,
    OVER_RANGE,
    TWO_FLASKS,
    SCATTERED,
    WAITING
  }

  /** A water sample, 10 mL made up to 20 mL with 0 to 80 µL of a stock of 5 mg/L; in µg/L. */
  public static Outcome water(String sample, String analyte, double native0, Shape shape) {
    Random random = new Random(sample.hashCode() * 31L + analyte.hashCode());
    Subject subject = new Subject("furnace", new SampleId(sample), analyte, "");
    int flasks = shape == Shape.TWO_FLASKS ? 2 : shape == Shape.WAITING ? 3 : 5;
    Instant start = shape == Shape.WAITING ? MOMENT.minus(Duration.ofHours(3)) : START;
    List<Recorded> readings = new ArrayList<>();
    for (int i = 0; i < flasks; i++) {
      FlaskFacts facts = waterFacts(20.0 * i);
      double x = native0 + 10.0 * i;
      double signal = 0.004 * (x - (shape == Shape.BENT ? 0.006 * x * x : 0));
      signal *= 1 + 0.004 * random.nextGaussian();
      signal += shape == Shape.ODD && i == 2 ? 0.03 : 0;
      signal += shape == Shape.SCATTERED ? 0.12 * random.nextGaussian() : 0;
      boolean over = shape == Shape.OVER_RANGE && i == flasks - 1;
      for (int replicate = 1; replicate <= 2; replicate++) {
        double read = rounded(signal * (1 + 0.003 * random.nextGaussian()));
        Signal said =
            over
                ? new Signal.NoNumber(Signal.State.OVER_RANGE, "OVR")
                : new Signal.Value(read, Numbers.plain(read));
        Instant at = start.plusSeconds(120L * (2 * i + replicate));
        Position cell = new Position(FURNACE, 2 + 2L * i + replicate, 6);
        readings.add(recorded(subject, "F" + (i + 1), replicate, at, said, facts, cell));
      }
    }
    return judged(subject, readings);
  }

  private static final Source FURNACE = new Source("furnace/run-0115.csv", Optional.empty());
  private static final Source PLASMA = new Source("plasma/0115.xlsx", Optional.of("Data"));

  /** A digest of 0.5 g in 50 mL, diluted fivefold, blank subtracted; in mg/kg dry. */
  public static Outcome sediment(String sample, String analyte) {
    Subject subject = new Subject("plasma", new SampleId(sample), analyte, "220.353");
    double[] signals = {1510, 2480, 3530, 4490};
    List<Recorded> readings = new ArrayList<>();
    for (int i = 0; i < signals.length; i++) {
      FlaskFacts facts = sedimentFacts(0.1 * i);
      for (int replicate = 1; replicate <= 3; replicate++) {
        double read = signals[i] + 6 * replicate;
        readings.add(
            recorded(
                subject,
                "S" + i,
                replicate,
                START.plusSeconds(60L * (3 * i + replicate)),
                new Signal.Value(read, Numbers.plain(read)),
                facts,
                new Position(PLASMA, 10 + 3L * i + replicate, 8)));
      }
    }
    return judged(subject, readings);
  }

  /** Readings of a flask that contradict one another. */
  public static Outcome ungrouped(String sample, String analyte) {
    Subject subject = new Subject("furnace", new SampleId(sample), analyte, "");
    List<Recorded> readings = new ArrayList<>();
    for (int i = 0; i < 2; i++) {
      readings.add(
          recorded(
              subject,
              "F1",
              i + 1,
              START.plusSeconds(60L * i),
              new Signal.Value(0.1, "0.1"),
              waterFacts(20.0 * i),
              new Position(FURNACE, 80 + i, 6)));
    }
    return judged(subject, readings);
  }

  private static Outcome judged(Subject subject, List<Recorded> readings) {
    return JUDGE.judge(gathered(subject, readings));
  }

  static Gathered gathered(Subject subject, List<Recorded> readings) {
    return new Gathering(RULES).gather(subject, readings).get(0);
  }

  /** A night of these series, looked at together. */
  static Night together(List<Gathered> series, Recall recall) {
    List<Gathered> ordered = series.stream().sorted(Comparator.comparing(Gathered::key)).toList();
    CriteriaBook book = CriteriaBook.defaults();
    DayFacts facts = new DayFacts(book, recall, ControlBook.EMPTY, List.of(), ControlHistory.NONE);
    Analysis analysis = Analysis.of(Fitted.each(ordered), JUDGE, facts);
    List<Outcome> outcomes = new ArrayList<>();
    analysis.forEach(outcomes::add);
    return night(outcomes, files(), refused(), analysis.learnt().pools());
  }

  static Recorded recorded(
      Subject subject,
      String flask,
      int replicate,
      Instant at,
      Signal signal,
      FlaskFacts facts,
      Position cell) {
    Reading reading =
        new Reading(
            subject,
            new Batch("run-0115", false),
            flask,
            true,
            Integer.toString(replicate),
            true,
            Optional.of(at),
            signal,
            facts,
            cell);
    return new Recorded(reading, 1, START.plus(Duration.ofHours(2)), 0);
  }

  private static FlaskFacts waterFacts(double microlitres) {
    Measured stock = Measured.exactly(new Quantity(5, MG_PER_L));
    return new FlaskFacts(
        Role.SAMPLE,
        Design.MADE_UP,
        new Addition.OfStock(new Quantity(microlitres, UL), stock),
        Optional.of(Measured.exactly(new Quantity(10, ML))),
        Optional.of(Measured.exactly(new Quantity(20, ML))),
        Optional.empty(),
        Preparation.NONE,
        Blanks.NONE,
        MethodFacts.of(UG_PER_L));
  }

  private static FlaskFacts sedimentFacts(double added) {
    return new FlaskFacts(
        Role.SAMPLE,
        Design.STATED,
        new Addition.Stated(new Quantity(added, MG_PER_L), Addition.Terms.SAMPLE),
        Optional.empty(),
        Optional.empty(),
        Optional.empty(),
        new Preparation(
            Optional.empty(),
            5,
            Optional.of(new Quantity(0.5, Unit.of("g"))),
            Optional.of(new Quantity(50, ML)),
            OptionalDouble.empty()),
        new Blanks(
            OptionalDouble.empty(),
            Optional.of(Measured.exactly(new Quantity(0.02, MG_PER_L))),
            Optional.empty()),
        MethodFacts.of(MG_PER_KG));
  }

  private static double rounded(double signal) {
    return Math.round(signal * 1e5) / 1e5;
  }

  /** Three deliveries: one read, one refused, one known already. */
  public static List<FileEntry> files() {
    String sha = "3f786850e387550fdab836ed7e6dc881de23001b0c9f3ad4a2d8f5a1c0ffee00";
    Instant at = Instant.parse("2025-01-15T11:00:00Z");
    return List.of(
        new FileEntry(
            1,
            "furnace/run-0115.csv",
            at,
            20_480,
            sha,
            "furnace",
            sha,
            "read",
            104,
            100,
            3,
            1,
            0,
            "",
            "furnace/done/2025-01-15/run-0115.csv"),
        new FileEntry(
            2,
            "furnace/run-0115 (copy).csv",
            at.plusSeconds(90),
            20_480,
            sha,
            "furnace",
            sha,
            "known",
            0,
            0,
            0,
            0,
            0,
            "the same content as no. 1",
            "furnace/done/2025-01-15/run-0115 (copy).csv"),
        new FileEntry(
            3,
            "plasma/half.xlsx",
            at.plusSeconds(600),
            1_024,
            sha,
            "",
            "",
            "refused",
            0,
            0,
            0,
            0,
            0,
            "the workbook ends early: it was probably still being written; drop it again",
            "plasma/rejected/half.xlsx"));
  }

  /** Three rows that were not used. */
  public static List<RefusedRow> refused() {
    String file = "furnace/run-0115.csv";
    return List.of(
        new RefusedRow(
            1, file, "", 17, 5, "Added (µL)", "2O", "not a number", "a number such as 20"),
        new RefusedRow(1, file, "", 44, 0, "", "FW-9;Pb", "row too short", "6 columns"),
        new RefusedRow(
            1, "plasma/0115.xlsx", "Data", 9, 28, "Unit", "ppm", "unit does not fit", "mg/L"));
  }

  private static List<Setting> settings() {
    return List.of(
        new Setting("Program", "version", "0.1.0", ""),
        new Setting("Configuration", "zone", "Europe/Lisbon", "conf/spikewright.toml"),
        new Setting("Configuration", "cut-off", "06:00", "default"));
  }
}
