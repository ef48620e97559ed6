package org.spikewright.demo;

import java.time.LocalDateTime;
import java.util.List;

/** The series of lab day 2026-03-04, export by export. */
final class DemoNight {
  private DemoNight() {}

  /**
   * An export: its series, when the first reading was taken, the pace in seconds, and whether a
   * drift check was read before the series and after them.
   */
  record Export(
      String name,
      LocalDateTime start,
      int secondsPerReading,
      boolean checked,
      List<SeriesPlan> plans) {

    /** Its readings in the order they were taken. */
    List<ReadingRow> readings() {
      return new Measurement(start, secondsPerReading).measure(plans);
    }
  }

  static final Export CADMIUM = checked("run_0304_am", "2026-03-04T07:05:00", 120, cadmium());
  static final Export LEAD = export("run_0304_pm", "2026-03-04T12:04:00", 105, lead());
  static final Export CUT = export("run_0305", "2026-03-05T07:10:00", 120, cut());
  static final Export NICKEL = export("waters_0304", "2026-03-04T07:20:00", 80, nickel());
  static final Export COPPER = export("sediment_0304", "2026-03-04T12:25:00", 80, copper());
  static final Export ZINC = export("cell2_20260304", "2026-03-04T07:40:00", 190, zinc());

  /** Every export in the order in which the truth file lists them. */
  static List<Export> exports() {
    return List.of(CADMIUM, LEAD, NICKEL, COPPER, ZINC, CUT);
  }

  private static Export export(String name, String start, int pace, List<SeriesPlan> plans) {
    return new Export(name, LocalDateTime.parse(start), pace, false, plans);
  }

  private static Export checked(String name, String start, int pace, List<SeriesPlan> plans) {
    return new Export(name, LocalDateTime.parse(start), pace, true, plans);
  }

  private static List<SeriesPlan> cadmium() {
    return List.of(
        SeriesPlan.water(Recipe.CADMIUM, "RB-0304", 0.02, 5)
            .with(Scenario.REAGENT_BLANK, "acid and water alone, prepared like a sample"),
        SeriesPlan.water(Recipe.CADMIUM, "QC-CD-0304", 12, 5)
            .with(Scenario.CONTROL_IN, "prepared at 12.0 µg/L"),
        SeriesPlan.water(Recipe.CADMIUM, "BW-2603-011", 8.2, 5),
        SeriesPlan.water(Recipe.CADMIUM, "BW-2603-012", 11.6, 5),
        SeriesPlan.water(Recipe.CADMIUM, "BW-2603-013", 19.4, 6).aliquot(10),
        SeriesPlan.water(Recipe.CADMIUM, "BW-2603-014", 9.7, 6)
            .with(Scenario.ODD_FLASK, "flask 4 of 6 reads 11 % low"),
        SeriesPlan.water(Recipe.CADMIUM, "BW-2603-015", 7.4, 5),
        SeriesPlan.water(Recipe.CADMIUM, "BW-2603-016", 28.7, 6)
            .with(Scenario.OVER_RANGE, "top flask of 6 reads OVER, both times"),
        SeriesPlan.water(Recipe.CADMIUM, "BW-2603-017", 12.9, 6),
        SeriesPlan.water(Recipe.CADMIUM, "BW-2603-018", 22.8, 5).aliquot(10),
        SeriesPlan.water(Recipe.CADMIUM, "BW-2603-019", 10.3, 5),
        SeriesPlan.water(Recipe.CADMIUM, "BW-2603-020", 8.9, 5),
        SeriesPlan.water(Recipe.CADMIUM, "BW-2603-025", 0.05, 5)
            .with(Scenario.BELOW_DETECTION, "hardly any cadmium"));
  }

  private static List<SeriesPlan> lead() {
    return List.of(
        SeriesPlan.water(Recipe.LEAD, "BW-2603-011", 84, 5),
        SeriesPlan.water(Recipe.LEAD, "BW-2603-012", 112, 5),
        SeriesPlan.water(Recipe.LEAD, "BW-2603-013", 176, 5).aliquot(10),
        SeriesPlan.water(Recipe.LEAD, "BW-2603-014", 96, 6),
        SeriesPlan.water(Recipe.LEAD, "BW-2603-015", 110, 6)
            .with(Scenario.BENT, "saturates: the straight line is more than 20 % high"),
        SeriesPlan.water(Recipe.LEAD, "BW-2603-016", 127, 5),
        SeriesPlan.water(Recipe.LEAD, "BW-2603-017", 91, 5)
            .with(Scenario.REFUSED_ROW, "second reading of flask 3 is ##### and not declared"),
        SeriesPlan.water(Recipe.LEAD, "BW-2603-018", 138, 5),
        SeriesPlan.water(Recipe.LEAD, "BW-2603-019", 104, 5),
        SeriesPlan.water(Recipe.LEAD, "BW-2603-020", 118, 5)
            .with(Scenario.SWAPPED, "flasks 3 and 4 stood in each other's place"),
        SeriesPlan.water(Recipe.LEAD, "BW-2603-026", 99, 5));
  }

  private static List<SeriesPlan> nickel() {
    return List.of(
        SeriesPlan.water(Recipe.NICKEL, "QC-NI-0304", 20, 5)
            .with(Scenario.CONTROL_IN, "prepared at 20.0 µg/L"),
        SeriesPlan.water(Recipe.NICKEL, "BW-2603-011", 14.8, 5),
        SeriesPlan.water(Recipe.NICKEL, "BW-2603-012", 21.5, 5),
        SeriesPlan.water(Recipe.NICKEL, "BW-2603-021", 460, 5)
            .with(Scenario.ADDITIONS_TOO_SMALL, "top addition is 0.09 times what is there"),
        SeriesPlan.water(Recipe.NICKEL, "BW-2603-022", 17.2, 6),
        SeriesPlan.water(Recipe.NICKEL, "BW-2603-023", 26.4, 6)
            .with(Scenario.NO_UNSPIKED_FLASK, "flask 1 of 6 was not measured"),
        SeriesPlan.water(Recipe.NICKEL, "007-B", 18.6, 5),
        SeriesPlan.water(Recipe.NICKEL, "0042", 24.1, 5),
        SeriesPlan.water(Recipe.NICKEL, "BW-2603-024", 15.9, 5),
        SeriesPlan.water(Recipe.NICKEL, "BW-2603-027", 19.3, 5),
        SeriesPlan.water(Recipe.NICKEL, "BW-2603-028", 22.7, 6)
            .with(Scenario.NOISY, "flasks scatter six times as much as usual"),
        SeriesPlan.water(Recipe.NICKEL, "BW-2603-029", 16.4, 5));
  }

  private static List<SeriesPlan> copper() {
    String beside = "digested with RM-SED-04; the truth is what reached the digest";
    return List.of(
        SeriesPlan.sediment("BW-2603-031", 61.0, 5, Digest.of("DG-0304-A", 0.5012, 48.6)),
        SeriesPlan.sediment("BW-2603-032", 38.5, 5, Digest.of("DG-0304-A", 0.5107, 57.2)),
        SeriesPlan.sediment("BW-2603-033", 74.2, 6, Digest.of("DG-0304-A", 0.4938, 43.9)),
        SeriesPlan.sediment("BW-2603-034", 52.8, 5, Digest.of("DG-0304-A", 0.5064, 51.4)),
        SeriesPlan.sediment("BW-2603-035", 88.3, 6, Digest.of("DG-0304-A", 0.4871, 39.8)),
        SeriesPlan.sediment("BW-2603-036", 45.7, 5, Digest.of("DG-0304-A", 0.5220, 60.3)),
        SeriesPlan.sediment("BW-2603-037", 57.9, 5, Digest.of("DG-0304-A", 0.4966, 52.7)),
        SeriesPlan.sediment("BW-2603-038", 66.4, 5, Digest.of("DG-0304-A", 0.5083, 46.1)),
        SeriesPlan.sediment("BW-2603-039", 41.2, 5, Digest.of("DG-0304-A", 0.5031, 55.5)),
        SeriesPlan.sediment("RM-SED-04", 46.8, 5, Digest.of("DG-0304-B", 0.5048, 97.2))
            .with(Scenario.CONTROL_OUT, "certified 58.5 mg/kg; a fifth stayed in the residue"),
        SeriesPlan.sediment("BW-2603-040", 49.6, 5, Digest.of("DG-0304-B", 0.4992, 50.8))
            .with(Scenario.CONTROL_OUT_BESIDE, beside),
        SeriesPlan.sediment("BW-2603-043", 70.3, 5, Digest.of("DG-0304-B", 0.5117, 44.7))
            .with(Scenario.CONTROL_OUT_BESIDE, beside));
  }

  private static List<SeriesPlan> zinc() {
    return List.of(
        SeriesPlan.water(Recipe.ZINC, "BW-2603-011", 152, 5),
        SeriesPlan.water(Recipe.ZINC, "BW-2603-012", 188, 5),
        SeriesPlan.water(Recipe.ZINC, "BW-2603-013", 236, 6),
        SeriesPlan.water(Recipe.ZINC, "BW-2603-014", 171, 5),
        SeriesPlan.water(Recipe.ZINC, "BW-2603-019", 26.7, 5)
            .with(Scenario.ADDITIONS_TOO_LARGE, "top addition is 15 times what is there"),
        SeriesPlan.water(Recipe.ZINC, "BW-2603-020", 214, 5),
        SeriesPlan.water(Recipe.ZINC, "BW-2603-021", 163, 6),
        SeriesPlan.water(Recipe.ZINC, "BW-2603-022", 195, 5),
        SeriesPlan.water(Recipe.ZINC, "BW-2603-023", 178, 5),
        SeriesPlan.water(Recipe.ZINC, "BW-2603-024", 143, 5)
            .with(Scenario.WRONG_STOCK, "spiked with 5 mg/L in place of 10: twice too high"),
        SeriesPlan.water(Recipe.ZINC, "BW-2603-030", 206, 5));
  }

  private static List<SeriesPlan> cut() {
    String why = "the export ends inside a quoted comment; nothing of it may count";
    return List.of(
        SeriesPlan.water(Recipe.CADMIUM, "BW-2603-041", 9.1, 5).with(Scenario.REFUSED_FILE, why),
        SeriesPlan.water(Recipe.CADMIUM, "BW-2603-042", 13.3, 5).with(Scenario.REFUSED_FILE, why));
  }
}
