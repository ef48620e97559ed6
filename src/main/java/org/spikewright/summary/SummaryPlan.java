package org.spikewright.summary;

import java.time.Instant;
import java.util.List;

/**
 * A night's workbook, sheet by sheet.
 *
 * @param title of the workbook
 * @param creator the program
 * @param moment the instant it stands for
 * @param sheets in order
 */
public record SummaryPlan(String title, String creator, Instant moment, List<SheetPlan> sheets) {

  /**
   * Plans the workbook. Walks the results and the outcomes once; the sheets' rows walk them again
   * when they are written (outcomes once more, results a few times).
   */
  public static SummaryPlan of(Night night) {
    Counts counts = Counts.of(night);
    SeriesIndex index = SeriesIndex.of(night, counts.plotted());
    return new SummaryPlan(
        "Summary of lab day " + night.labDay() + ", revision " + night.revision(),
        "Spikewright",
        night.moment(),
        List.of(
            OverviewSheet.of(night, counts, index),
            ResultsSheet.of(night, index),
            RepeatSheet.of(night, counts, index),
            SeriesSheet.of(night, index),
            PlotSheet.of(night, counts, index),
            NoiseSheet.of(night, counts, index),
            ControlsSheet.of(night),
            FilesSheet.of(night),
            RefusedSheet.of(night),
            SettingsSheet.of(night),
            PlotData.of(night, index),
            NoiseData.of(night, index)));
  }
}
