package org.spikewright.workbook;

import java.util.List;
import org.spikewright.summary.CellPlan;
import org.spikewright.summary.ColumnPlan;
import org.spikewright.summary.Look;

/**
 * How high a row has to be for its text. Said in the file, because programs differ in whether they
 * find it out themselves.
 */
final class RowHeights {
  /** The height of a row that needs no more, in points. */
  static final float ONE_LINE = 15;

  private static final float LINE = 13.2f;

  /** Text that a formula looks up may be longer for another choice. */
  private static final int LINES_LOOKED_UP = 3;

  private static final int MOST_LINES = 30;

  private final List<ColumnPlan> columns;

  RowHeights(List<ColumnPlan> columns) {
    this.columns = columns;
  }

  float of(List<CellPlan> cells) {
    float points = ONE_LINE;
    for (int i = 0; i < cells.size(); i++) {
      CellPlan cell = cells.get(i);
      int width = i < columns.size() ? columns.get(i).width() : 10;
      if (cell instanceof CellPlan.Text text) {
        points = Math.max(points, of(text, width));
      } else if (cell instanceof CellPlan.Formula formula
          && formula.cached() instanceof CellPlan.Text text
          && text.look() == Look.WRAPPED
          && width > 20) {
        points = Math.max(points, Math.max(of(text, width), LINES_LOOKED_UP * LINE));
      }
    }
    return points;
  }

  private static float of(CellPlan.Text text, int width) {
    return switch (text.look()) {
      case TITLE -> 24;
      case HEADING -> 20;
      case WRAPPED, HEADER, HEADER_RIGHT -> 2 + LINE * lines(text.text(), width);
      default -> ONE_LINE;
    };
  }

  private static int lines(String text, int width) {
    int lines = 0;
    int start = 0;
    while (start <= text.length() && lines < MOST_LINES) {
      int end = text.indexOf('\n', start);
      end = end < 0 ? text.length() : end;
      // Words are not cut, which costs room at the ends of lines.
      lines += 1 + (int) ((end - start) * 1.02 / width);
      start = end + 1;
    }
    return Math.max(1, lines);
  }
}
