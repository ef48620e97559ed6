package org.spikewright.demo;

import java.time.LocalDateTime;
import java.util.List;

/** The series of lab day 2026-03-04, export by export. */
final class DemoNight {
  private DemoNight() {}

  /** An export: its series, when the first reading was taken, and the pace in seconds. */
  record Export(String name, LocalDateTime start, int secondsPerReading, List<SeriesPlan> plans) {

    /** Its readings in the order they were taken. */
    List<ReadingRow> readings() {
      return new Measurement(start, secondsPerReading).measure(plans);
    }
  }

  static final Export CADMIUM = export("run_0304_am", "2026-03-04T07:05:00", 150, cadmium());
  static final Export LEAD = export("run_0304_pm", "2026-03-04T12:14:00", 138, lead());
  static final Export CUT = export("run_0305", "2026-03-05T07:10:00", 150, cut());
  static final Export NICKEL = export("waters_0304", "2026-03-04T08:20:00", 95, nickel());
  static final Export COPPER = export("sediment_0304", "2026-03-04T13:05:00", 95, copper());
  static final Export ZINC = export("cell2_20260304", "2026-03-04T07:40:00", 250, zinc());

  /** Every export in the order in which the truth file lists them. */
  static List<Export> exports() {
    return List.of(CADMIUM, LEAD, NICKEL, COPPER, ZINC, CUT);
  }

  private static Export export(String name, String start, int pace, List<SeriesPlan> plans) {
    return new Export(name, LocalDateTime.parse(start), pace, plans);
  }

  private static List<SeriesPlan> cadmium() {
    return List.of(
        SeriesPlan.water(Recipe.CADMIUM, "BW-2603-011", 8.2, 5),
        SeriesPlan.water(Recipe.CADMIUM, "BW-2603-012", 11.6, 5),
        SeriesPlan.water(Recipe.CADMIUM, "BW-2603-013", 19.4, 6).aliquot(10),
        SeriesPlan.water(Recipe.CADMIUM, "BW-2603-014", 9.7, 6)
            .with(Scenario.ODD_FLASK, "flask 4 of 6 reads 11 % low: ten times the usual flask sd"),
        SeriesPlan.water(Recipe.CADMIUM, "BW-2603-015", 7.4, 5),
        SeriesPlan.water(Recipe.CADMIUM, "BW-2603-016", 30.5, 6)
            .with(Scenario.OVER_RANGE, "top flask of 6 reads OVER, both times"),
        SeriesPlan.water(Recipe.CADMIUM, "BW-2603-017", 12.9, 6),
        SeriesPlan.water(Recipe.CADMIUM, "BW-2603-018", 22.8, 5).aliquot(10),
        SeriesPlan.water(Recipe.CADMIUM, "BW-2603-019", 10.3, 5),
        SeriesPlan.water(Recipe.CADMIUM, "BW-2603-020", 8.9, 5));
  }

  private static List<SeriesPlan> lead() {
    return List.of(
        SeriesPlan.water(Recipe.LEAD, "BW-2603-011", 84, 5),
        SeriesPlan.water(Recipe.LEAD, "BW-2603-012", 112, 5),
        SeriesPlan.water(Recipe.LEAD, "BW-2603-013", 176, 5).aliquot(10),
        SeriesPlan.water(Recipe.LEAD, "BW-2603-014", 96, 6),
        SeriesPlan.water(Recipe.LEAD, "BW-2603-015", 110, 6)
            .with(Scenario.BENT, "saturates: the straight line is about 20 % high"),
        SeriesPlan.water(Recipe.LEAD, "BW-2603-016", 127, 5),
        SeriesPlan.water(Recipe.LEAD, "BW-2603-017", 91, 5)
            .with(Scenario.REFUSED_ROW, "second reading of flask 3 is ##### and not declared"),
        SeriesPlan.water(Recipe.LEAD, "BW-2603-018", 138, 5));
  }

  private static List<SeriesPlan> nickel() {
    return List.of(
        SeriesPlan.water(Recipe.NICKEL, "BW-2603-011", 14.8, 5),
        SeriesPlan.water(Recipe.NICKEL, "BW-2603-012", 21.5, 5),
        SeriesPlan.water(Recipe.NICKEL, "BW-2603-021", 200, 5)
            .with(Scenario.ADDITIONS_TOO_SMALL, "top addition is 0.2 times what is there"),
        SeriesPlan.water(Recipe.NICKEL, "BW-2603-022", 17.2, 6),
        SeriesPlan.water(Recipe.NICKEL, "BW-2603-023", 26.4, 6)
            .with(Scenario.NO_UNSPIKED_FLASK, "flask 1 of 6 was not measured"),
        SeriesPlan.water(Recipe.NICKEL, "007-B", 18.6, 5),
        SeriesPlan.water(Recipe.NICKEL, "0042", 24.1, 5),
        SeriesPlan.water(Recipe.NICKEL, "BW-2603-024", 15.9, 5));
  }

  private static List<SeriesPlan> copper() {
    return List.of(
        SeriesPlan.sediment("BW-2603-031", 61.0, 5, new Digest(0.5012, 50, 10, 48.6)),
        SeriesPlan.sediment("BW-2603-032", 38.5, 5, new Digest(0.5107, 50, 10, 57.2)),
        SeriesPlan.sediment("BW-2603-033", 74.2, 6, new Digest(0.4938, 50, 10, 43.9)),
        SeriesPlan.sediment("BW-2603-034", 52.8, 5, new Digest(0.5064, 50, 10, 51.4)),
        SeriesPlan.sediment("BW-2603-035", 88.3, 6, new Digest(0.4871, 50, 10, 39.8)),
        SeriesPlan.sediment("BW-2603-036", 45.7, 5, new Digest(0.5220, 50, 10, 60.3)));
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
        SeriesPlan.water(Recipe.ZINC, "BW-2603-022", 195, 5));
  }

  private static List<SeriesPlan> cut() {
    String why = "the export ends inside a quoted comment; nothing of it may count";
    return List.of(
        SeriesPlan.water(Recipe.CADMIUM, "BW-2603-041", 9.1, 5).with(Scenario.REFUSED_FILE, why),
        SeriesPlan.water(Recipe.CADMIUM, "BW-2603-042", 13.3, 5).with(Scenario.REFUSED_FILE, why));
  }
}
