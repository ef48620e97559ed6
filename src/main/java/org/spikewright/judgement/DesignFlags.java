package org.spikewright.judgement;

import java.time.Instant;
import java.util.ArrayList;
import java.util.List;
import org.spikewright.judgement.Flag.Weight;
import org.spikewright.series.AdditionSeries;
import org.spikewright.series.Flask;
import org.spikewright.series.Gathered;
import org.spikewright.series.SeriesNote;
import org.spikewright.series.Ungrouped;

/** Flags that need no line: how the series was laid out and what the record says. */
final class DesignFlags {
  private DesignFlags() {}

  static Flag noSeries(Ungrouped ungrouped) {
    return Flags.plain(
        FlagKind.NO_SERIES,
        Weight.REPEAT,
        "No series can be formed: " + ungrouped.found() + "; needed: " + ungrouped.expected() + ".",
        "Correct the export, the bench data or the mapping and deliver the file again.");
  }

  static Flag unfitted(AdditionSeries series, String reason) {
    boolean oneLevel = series.flasks().stream().mapToDouble(Flask::x).distinct().count() < 2;
    if (oneLevel) {
      return Flags.plain(
          FlagKind.NO_ADDITIONS,
          Weight.REPEAT,
          series.flasks().stream().allMatch(Flask::isUnspiked)
              ? "No flask of this sample has an addition."
              : "All flasks hold the same addition.",
          "Measure the flasks with additions, or deliver the file that holds them.");
    }
    return Flags.plain(
        FlagKind.SLOPE_NOT_ESTABLISHED,
        Weight.REPEAT,
        "No result can be computed: " + reason + ".",
        "Check stock, additions and the measurement; prepare the series again.");
  }

  static Flag waiting(Gathered gathered, Instant until) {
    AdditionSeries series = (AdditionSeries) gathered;
    return Flags.plain(
        FlagKind.WAITING,
        Weight.NOTE,
        series.preparedFlasks()
            + " of "
            + series.method().expectedFlasks()
            + " flasks are here; the others are waited for until "
            + until
            + ".",
        "Deliver the remaining flasks; after that time the series is judged as it is.");
  }

  static List<Flag> of(AdditionSeries series, Criteria criteria) {
    List<Flag> flags = new ArrayList<>();
    if (series.usableFlasks().stream().noneMatch(Flask::isUnspiked)) {
      flags.add(
          Flags.plain(
              FlagKind.NO_UNSPIKED_FLASK,
              Weight.REVIEW,
              "No flask without an addition: the line is carried back over a gap.",
              "Measure an unspiked flask of this sample."));
    }
    fewFlasks(series, flags);
    UnevenAdditions.flag(series, criteria.of(Criterion.UNEVEN_ADDITIONS)).ifPresent(flags::add);
    if (series.method().fitReadings()) {
      flags.add(
          Flags.plain(
              FlagKind.READINGS_AS_FLASKS,
              Weight.NOTE,
              "Each reading counts as a flask, as the mapping asks: the interval covers reading"
                  + " noise, not preparation.",
              "Prefer flasks as the unit of evidence."));
    }
    series.notes().forEach(note -> flags.add(of(note, series)));
    return flags;
  }

  private static void fewFlasks(AdditionSeries series, List<Flag> flags) {
    int expected = series.method().expectedFlasks();
    int flasks = series.preparedFlasks();
    long levels = series.usableFlasks().stream().mapToDouble(Flask::x).distinct().count();
    if (flasks >= expected) {
      return;
    }
    flags.add(
        Flags.plain(
            FlagKind.FEW_FLASKS,
            Weight.REVIEW,
            flasks
                + (flasks == 1 ? " flask" : " flasks")
                + " at "
                + levels
                + (levels == 1 ? " level" : " levels")
                + " of addition; the method expects "
                + expected
                + ".",
            "Look for a missing file or refused row; else prepare the missing flasks."));
  }

  private static Flag of(SeriesNote note, AdditionSeries series) {
    return switch (note.kind()) {
      case SUPERSEDED_READING ->
          Flags.plain(
              FlagKind.SUPERSEDED_READING,
              Weight.REVIEW,
              "A later delivery changed readings: " + note.words() + ".",
              "Compare with the earlier export, which is kept under done.");
      case SECOND_RUN ->
          Flags.plain(
              FlagKind.SECOND_RUN,
              Weight.REVIEW,
              "Measured a second time: flask "
                  + note.words()
                  + "; the first run gives the result, the second "
                  + secondResult(series)
                  + ".",
              "Decide which run counts; both are on the Series sheet.");
      case EXPORTED_AGAIN ->
          Flags.plain(
              FlagKind.EXPORTED_AGAIN,
              Weight.NOTE,
              "The same readings came again as " + note.words() + "; counted once.",
              "Nothing to do.");
      case UNEQUAL_ALIQUOTS ->
          Flags.plain(
              FlagKind.UNEQUAL_ALIQUOTS,
              Weight.NOTE,
              "Aliquots differ (" + note.words() + "): the matrix is not the same in each flask.",
              "Prefer equal aliquots.");
      case OVER_RANGE ->
          Flags.plain(
              FlagKind.OVER_RANGE,
              Weight.REVIEW,
              "Reading over range, left out: " + note.words() + ".",
              "Use smaller additions or dilute the sample, so that every flask can be read.");
      case LEFT_OUT ->
          Flags.plain(
              FlagKind.LEFT_OUT,
              Weight.NOTE,
              "Reading below range or missing, left out: " + note.words() + ".",
              "Check whether the flask should be read again.");
      case EXPIRED_STOCK ->
          Flags.plain(
              FlagKind.EXPIRED_STOCK,
              Weight.NOTE,
              "Spiked with an expired stock: " + note.words() + ".",
              "Check the stock against a fresh one, or renew its entry in the table of stocks.");
    };
  }

  /** What the second run alone would give. */
  private static String secondResult(AdditionSeries series) {
    SeriesFit second = series.secondRun().map(SeriesFit::of).orElseThrow();
    String unit = " " + series.toResult().unit().symbol();
    if (second instanceof SeriesFit.ByElectrode electrode) {
      return "would give " + Flags.n(electrode.result().value()) + unit;
    }
    return second instanceof SeriesFit.Fitted line
        ? "would give " + Flags.n(line.result().value()) + unit
        : "gives none by itself";
  }
}
