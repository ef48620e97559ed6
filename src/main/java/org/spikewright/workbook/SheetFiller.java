package org.spikewright.workbook;

import java.util.List;
import org.apache.poi.common.usermodel.HyperlinkType;
import org.apache.poi.ss.usermodel.Cell;
import org.apache.poi.ss.usermodel.FormulaError;
import org.apache.poi.ss.usermodel.Row;
import org.apache.poi.ss.util.CellReference;
import org.apache.poi.xssf.streaming.SXSSFSheet;
import org.apache.poi.xssf.usermodel.XSSFHyperlink;
import org.apache.poi.xssf.usermodel.XSSFSheet;
import org.spikewright.summary.CellPlan;
import org.spikewright.summary.Look;
import org.spikewright.summary.SheetPlan;

/** Puts planned rows into one sheet, top down. */
final class SheetFiller {
  private final SXSSFSheet sheet;
  private final XSSFSheet underlying;
  private final Styles styles;
  private final RowHeights heights;
  private int next;

  SheetFiller(SheetPlan plan, SXSSFSheet sheet, XSSFSheet underlying, Styles styles) {
    this.sheet = sheet;
    this.underlying = underlying;
    this.styles = styles;
    this.heights = new RowHeights(plan.columns());
  }

  /** How many rows there are. */
  int rows() {
    return next;
  }

  /** Adds a row below. */
  void add(List<CellPlan> cells) {
    int number = next++;
    if (cells.isEmpty()) {
      return;
    }
    Row row = sheet.createRow(number);
    for (int i = 0; i < cells.size(); i++) {
      CellPlan plan = cells.get(i);
      if (!(plan instanceof CellPlan.Empty)) {
        put(plan, row.createCell(i));
      }
    }
    float points = heights.of(cells);
    if (points > RowHeights.ONE_LINE) {
      row.setHeightInPoints(points);
    }
  }

  private void put(CellPlan plan, Cell cell) {
    if (plan instanceof CellPlan.Text text) {
      putText(text, cell);
    } else if (plan instanceof CellPlan.Number number) {
      cell.setCellValue(number.value());
      cell.setCellStyle(styles.of(number.look(), number.format()));
    } else if (plan instanceof CellPlan.Formula formula) {
      cell.setCellFormula(formula.formula());
      putCached(formula.cached(), cell);
    } else if (plan instanceof CellPlan.Moment moment) {
      cell.setCellValue(moment.value());
      cell.setCellStyle(styles.of(Look.PLAIN, Styles.MOMENT));
    } else if (plan instanceof CellPlan.Day day) {
      cell.setCellValue(day.value());
      cell.setCellStyle(styles.of(Look.PLAIN, Styles.DAY));
    } else if (plan instanceof CellPlan.Link link) {
      putLink(link, cell);
    }
  }

  private void putText(CellPlan.Text text, Cell cell) {
    cell.setCellValue(CellText.of(text.text()));
    cell.setCellStyle(styles.ofText(text.look(), CellText.needsQuote(text.text())));
  }

  /** The value that shows until the sheet is computed anew. */
  private void putCached(CellPlan cached, Cell cell) {
    if (cached instanceof CellPlan.Number number) {
      cell.setCellValue(number.value());
      cell.setCellStyle(styles.of(number.look(), number.format()));
    } else if (cached instanceof CellPlan.Text text) {
      cell.setCellValue(CellText.of(text.text()));
      cell.setCellStyle(styles.ofText(text.look(), false));
    } else if (cached instanceof CellPlan.NotAvailable) {
      cell.setCellErrorValue(FormulaError.NA.getCode());
      cell.setCellStyle(styles.of(Look.FAINT, "General"));
    } else {
      throw new IllegalArgumentException("a formula cannot hold " + cached);
    }
  }

  /**
   * The link goes to the underlying sheet at once: the cell's own setter first searches all earlier
   * links, which takes minutes for thousands.
   */
  private void putLink(CellPlan.Link link, Cell cell) {
    cell.setCellValue(CellText.of(link.text()));
    cell.setCellStyle(styles.ofLink());
    XSSFHyperlink target =
        (XSSFHyperlink)
            sheet.getWorkbook().getCreationHelper().createHyperlink(HyperlinkType.DOCUMENT);
    target.setAddress("'" + link.sheet() + "'!A" + link.row());
    target.setCellReference(new CellReference(cell.getRowIndex(), cell.getColumnIndex()));
    underlying.addHyperlink(target);
  }
}
