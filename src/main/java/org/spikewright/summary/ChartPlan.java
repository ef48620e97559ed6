package org.spikewright.summary;

import java.util.List;

/** A native chart, fed by cells. */
public sealed interface ChartPlan {

  /** What it shows, in a few words. */
  String title();

  /** Where it lies. */
  Box box();

  /**
   * The cells a chart covers, counted from 0; the right column and the bottom row are not covered.
   */
  record Box(int left, int top, int right, int bottom) {}

  /**
   * A row of cells with the numbers they hold when the workbook is written.
   *
   * @param range with its sheet: {@code 'Plot'!$K$2:$K$9}
   * @param cached NaN where a cell holds no number
   */
  record Cells(String range, List<Double> cached) {}

  /**
   * Columns in parts, one part on the other.
   *
   * @param categories range of the categories' names
   * @param names the categories' names as written
   * @param parts from the bottom up
   */
  record StackedColumns(
      String title, Box box, String categories, List<String> names, List<Part> parts)
      implements ChartPlan {}

  /**
   * One part of each column.
   *
   * @param name shown in the legend
   * @param look whose colour it takes
   */
  record Part(String name, Look look, Cells cells) {}

  /**
   * Points and lines over two number axes.
   *
   * @param xTitle what the horizontal axis shows
   * @param yTitle what the vertical axis shows
   */
  record Scatter(String title, Box box, String xTitle, String yTitle, List<Trace> traces)
      implements ChartPlan {}

  /**
   * One set of points.
   *
   * @param name shown in the legend
   * @param stroke how it is drawn
   * @param spread half-lengths of vertical bars about the points; empty for none, else one
   */
  record Trace(String name, Stroke stroke, Cells x, Cells y, List<Cells> spread) {}

  /** How a set of points is drawn. */
  enum Stroke {
    /** Filled marks. */
    POINTS,
    /** Large crosses over other marks. */
    CROSSES,
    /** A thin line without marks. */
    LINE,
    /** A thick line with end marks. */
    INTERVAL
  }
}
