package org.spikewright.workbook;

import java.io.IOException;
import java.util.List;
import org.apache.poi.common.usermodel.HyperlinkType;
import org.apache.poi.ss.usermodel.CellStyle;
import org.apache.poi.ss.usermodel.DateUtil;
import org.apache.poi.ss.usermodel.FormulaError;
import org.apache.poi.ss.util.CellReference;
import org.apache.poi.xssf.usermodel.XSSFHyperlink;
import org.spikewright.summary.CellPlan;
import org.spikewright.summary.Look;
import org.spikewright.summary.SheetPlan;
import org.spikewright.workbook.StreamedBook.StreamedSheet;

/** Puts planned rows into one sheet, top down. */
final class SheetFiller {
  private final StreamedSheet sheet;
  private final SheetRows out;
  private final Styles styles;
  private final RowHeights heights;
  private int next;

  SheetFiller(SheetPlan plan, StreamedSheet sheet, Styles styles) {
    this.sheet = sheet;
    this.out = sheet.rows();
    this.styles = styles;
    this.heights = new RowHeights(plan.columns());
  }

  /** How many rows there are. */
  int rows() {
    return next;
  }

  /** Adds a row below. */
  void add(List<CellPlan> cells) throws IOException {
    int number = ++next;
    if (cells.isEmpty()) {
      return;
    }
    float points = heights.of(cells);
    if (points > RowHeights.ONE_LINE) {
      out.begin(number, points);
    } else {
      out.begin(number);
    }
    for (int i = 0; i < cells.size(); i++) {
      put(cells.get(i), i);
    }
    out.end();
  }

  private void put(CellPlan plan, int column) {
    if (plan instanceof CellPlan.Text text) {
      boolean quoted = CellText.needsQuote(text.text());
      out.text(column, styles.ofText(text.look(), quoted), CellText.of(text.text()));
    } else if (plan instanceof CellPlan.Number number) {
      out.number(column, styles.of(number.look(), number.format()), number.value());
    } else if (plan instanceof CellPlan.Formula formula) {
      putFormula(formula, column);
    } else if (plan instanceof CellPlan.Moment moment) {
      CellStyle style = styles.of(Look.PLAIN, Styles.MOMENT);
      out.number(column, style, DateUtil.getExcelDate(moment.value()));
    } else if (plan instanceof CellPlan.Day day) {
      CellStyle style = styles.of(Look.PLAIN, Styles.DAY);
      out.number(column, style, DateUtil.getExcelDate(day.value()));
    } else if (plan instanceof CellPlan.Link link) {
      putLink(link, column);
    }
  }

  /** A formula with the value that shows until the sheet is computed anew. */
  private void putFormula(CellPlan.Formula plan, int column) {
    String formula = plan.formula();
    if (plan.cached() instanceof CellPlan.Number number) {
      CellStyle style = styles.of(number.look(), number.format());
      out.formula(column, style, formula, number.value());
    } else if (plan.cached() instanceof CellPlan.Text text) {
      CellStyle style = styles.ofText(text.look(), false);
      out.formula(column, style, formula, CellText.of(text.text()));
    } else if (plan.cached() instanceof CellPlan.NotAvailable) {
      CellStyle style = styles.of(Look.FAINT, "General");
      out.failing(column, style, formula, FormulaError.NA.getString());
    } else {
      throw new IllegalArgumentException("a formula cannot hold " + plan.cached());
    }
  }

  /** A cell and, beside the rows, where it leads. */
  private void putLink(CellPlan.Link link, int column) {
    out.text(column, styles.ofLink(), CellText.of(link.text()));
    XSSFHyperlink target =
        sheet
            .underlying()
            .getWorkbook()
            .getCreationHelper()
            .createHyperlink(HyperlinkType.DOCUMENT);
    target.setAddress("'" + link.sheet() + "'!A" + link.row());
    target.setCellReference(new CellReference(next - 1, column));
    sheet.underlying().addHyperlink(target);
  }
}
