package org.spikewright.workbook;

import org.apache.poi.ss.usermodel.DataValidation;
import org.apache.poi.ss.usermodel.DataValidationHelper;
import org.apache.poi.ss.usermodel.IgnoredErrorType;
import org.apache.poi.ss.usermodel.Name;
import org.apache.poi.ss.usermodel.PageMargin;
import org.apache.poi.ss.usermodel.PrintSetup;
import org.apache.poi.ss.usermodel.Sheet;
import org.apache.poi.ss.util.CellRangeAddress;
import org.apache.poi.ss.util.CellRangeAddressList;
import org.apache.poi.xssf.streaming.SXSSFSheet;
import org.apache.poi.xssf.streaming.SXSSFWorkbook;
import org.apache.poi.xssf.usermodel.XSSFSheet;
import org.spikewright.summary.SheetPlan;
import org.spikewright.workbook.StreamedBook.StreamedSheet;

/** How one sheet lies on screen and paper, and what lies over its cells. */
final class SheetPage {
  private static final int CHARACTER = 256;

  private final SheetPlan plan;
  private final SXSSFWorkbook book;
  private final SXSSFSheet sheet;
  private final XSSFSheet underlying;

  SheetPage(SheetPlan plan, SXSSFWorkbook book, StreamedSheet sheet) {
    this.plan = plan;
    this.book = book;
    this.sheet = sheet.streamed();
    this.underlying = sheet.underlying();
  }

  /**
   * Lays the sheet out once its rows are known.
   *
   * @param rows how many it has
   * @param part 1 for the first sheet of a plan, 2 for its continuation
   */
  void layOut(int rows, int part) {
    for (int i = 0; i < plan.columns().size(); i++) {
      sheet.setColumnWidth(i, plan.columns().get(i).width() * CHARACTER);
    }
    if (isScrolled() && !plan.head().isEmpty()) {
      sheet.createFreezePane(0, plan.head().size());
    }
    sheet.setDisplayGridlines(plan.layout().table().isPresent());
    table(rows, part);
    print(rows);
    plan.choices().forEach(this::choice);
    if (part == 1) {
      plan.charts().forEach(chart -> new Charts(underlying).draw(chart));
    }
    CellRangeAddress all =
        new CellRangeAddress(0, Math.max(rows - 1, 0), 0, plan.columns().size() - 1);
    underlying.setDimensionOverride(all);
    // Sample names made of digits are meant as text: no warning mark in their corner.
    underlying.addIgnoredErrors(all, IgnoredErrorType.NUMBER_STORED_AS_TEXT);
    book.setSheetHidden(
        book.getSheetIndex(sheet), plan.layout().kind() == SheetPlan.Kind.HIDDEN_ROWS);
  }

  private boolean isScrolled() {
    SheetPlan.Kind kind = plan.layout().kind();
    return kind != SheetPlan.Kind.PAGE && kind != SheetPlan.Kind.ONE_PAGE;
  }

  private void table(int rows, int part) {
    if (plan.layout().table().isEmpty()) {
      return;
    }
    int header = plan.head().size() - 1;
    int lastColumn = plan.columns().size() - 1;
    CellRangeAddress range =
        new CellRangeAddress(header, Math.max(rows - 1, header), 0, lastColumn);
    if (plan.layout().kind() != SheetPlan.Kind.HIDDEN_ROWS) {
      sheet.setAutoFilter(range);
    }
    Name name = book.createName();
    name.setNameName(plan.layout().table().get() + (part == 1 ? "" : part));
    name.setRefersToFormula(range.formatAsString(sheet.getSheetName(), true));
  }

  private void print(int rows) {
    PrintSetup setup = sheet.getPrintSetup();
    setup.setPaperSize(PrintSetup.A4_PAPERSIZE);
    boolean onePage = plan.layout().kind() == SheetPlan.Kind.ONE_PAGE;
    setup.setLandscape(!onePage);
    setup.setFitWidth((short) 1);
    setup.setFitHeight((short) (onePage ? 1 : 0));
    sheet.setFitToPage(true);
    sheet.setMargin(PageMargin.LEFT, 0.4);
    sheet.setMargin(PageMargin.RIGHT, 0.4);
    sheet.setMargin(PageMargin.TOP, 0.5);
    sheet.setMargin(PageMargin.BOTTOM, 0.6);
    sheet.getFooter().setLeft("&F  ·  &A");
    sheet.getFooter().setRight("page &P of &N");
    if (!plan.head().isEmpty()) {
      int last = plan.head().size() - 1;
      int first = plan.layout().table().isPresent() ? last : 0;
      sheet.setRepeatingRows(new CellRangeAddress(first, last, -1, -1));
    }
    if (plan.layout().printColumns() > 0) {
      int index = book.getSheetIndex((Sheet) sheet);
      book.setPrintArea(index, 0, plan.layout().printColumns() - 1, 0, Math.max(rows - 1, 0));
    }
  }

  private void choice(SheetPlan.Choice choice) {
    DataValidationHelper validations = sheet.getDataValidationHelper();
    int row = choice.row() - 1;
    int column = choice.column() - 1;
    DataValidation validation =
        validations.createValidation(
            validations.createFormulaListConstraint(choice.list()),
            new CellRangeAddressList(row, row, column, column));
    validation.setShowErrorBox(true);
    validation.setErrorStyle(DataValidation.ErrorStyle.STOP);
    validation.createErrorBox("Not in the list", "Choose a series from the list.");
    sheet.addValidationData(validation);
  }
}
