package org.spikewright.workbook;

import org.apache.poi.xddf.usermodel.PresetLineDash;
import org.apache.poi.xddf.usermodel.XDDFColor;
import org.apache.poi.xddf.usermodel.XDDFLineProperties;
import org.apache.poi.xddf.usermodel.XDDFNoFillProperties;
import org.apache.poi.xddf.usermodel.XDDFPresetLineDash;
import org.apache.poi.xddf.usermodel.XDDFShapeProperties;
import org.apache.poi.xddf.usermodel.XDDFSolidFillProperties;
import org.apache.poi.xddf.usermodel.chart.AxisCrossBetween;
import org.apache.poi.xddf.usermodel.chart.AxisCrosses;
import org.apache.poi.xddf.usermodel.chart.AxisPosition;
import org.apache.poi.xddf.usermodel.chart.AxisTickLabelPosition;
import org.apache.poi.xddf.usermodel.chart.BarDirection;
import org.apache.poi.xddf.usermodel.chart.BarGrouping;
import org.apache.poi.xddf.usermodel.chart.ChartTypes;
import org.apache.poi.xddf.usermodel.chart.DisplayBlanks;
import org.apache.poi.xddf.usermodel.chart.LegendPosition;
import org.apache.poi.xddf.usermodel.chart.MarkerStyle;
import org.apache.poi.xddf.usermodel.chart.ScatterStyle;
import org.apache.poi.xddf.usermodel.chart.XDDFBarChartData;
import org.apache.poi.xddf.usermodel.chart.XDDFCategoryAxis;
import org.apache.poi.xddf.usermodel.chart.XDDFChartAxis;
import org.apache.poi.xddf.usermodel.chart.XDDFChartData;
import org.apache.poi.xddf.usermodel.chart.XDDFChartLegend;
import org.apache.poi.xddf.usermodel.chart.XDDFDataSourcesFactory;
import org.apache.poi.xddf.usermodel.chart.XDDFNumericalDataSource;
import org.apache.poi.xddf.usermodel.chart.XDDFScatterChartData;
import org.apache.poi.xddf.usermodel.chart.XDDFValueAxis;
import org.apache.poi.xddf.usermodel.text.XDDFTextRun;
import org.apache.poi.xssf.usermodel.XSSFChart;
import org.apache.poi.xssf.usermodel.XSSFClientAnchor;
import org.apache.poi.xssf.usermodel.XSSFDrawing;
import org.apache.poi.xssf.usermodel.XSSFSheet;
import org.openxmlformats.schemas.drawingml.x2006.chart.CTErrBars;
import org.openxmlformats.schemas.drawingml.x2006.chart.CTNumData;
import org.openxmlformats.schemas.drawingml.x2006.chart.CTNumRef;
import org.openxmlformats.schemas.drawingml.x2006.chart.CTNumVal;
import org.openxmlformats.schemas.drawingml.x2006.chart.STErrBarType;
import org.openxmlformats.schemas.drawingml.x2006.chart.STErrDir;
import org.openxmlformats.schemas.drawingml.x2006.chart.STErrValType;
import org.spikewright.summary.ChartPlan;
import org.spikewright.summary.Look;

/**
 * Draws planned charts. Every line, bar and axis gets an explicit fill and no curve is smoothed:
 * spreadsheet programs differ in what they draw where nothing is said.
 */
final class Charts {
  private final XSSFSheet sheet;

  Charts(XSSFSheet sheet) {
    this.sheet = sheet;
  }

  void draw(ChartPlan plan) {
    ChartPlan.Box box = plan.box();
    XSSFDrawing drawing = sheet.createDrawingPatriarch();
    XSSFClientAnchor anchor =
        drawing.createAnchor(0, 0, 0, 0, box.left(), box.top(), box.right(), box.bottom());
    XSSFChart chart = drawing.createChart(anchor);
    chart.setTitleText(plan.title());
    chart.setTitleOverlay(false);
    XDDFTextRun title = chart.getFormattedTitle().getParagraph(0).getTextRuns().get(0);
    title.setFontSize(11.0);
    title.setBold(true);
    chart.displayBlanksAs(DisplayBlanks.GAP);
    XDDFChartLegend legend = chart.getOrAddLegend();
    legend.setPosition(LegendPosition.BOTTOM);
    if (plan instanceof ChartPlan.StackedColumns columns) {
      columns(chart, columns);
    } else if (plan instanceof ChartPlan.Scatter scatter) {
      scatter(chart, scatter);
    }
  }

  private static void columns(XSSFChart chart, ChartPlan.StackedColumns plan) {
    XDDFCategoryAxis bottom = chart.createCategoryAxis(AxisPosition.BOTTOM);
    XDDFValueAxis left = chart.createValueAxis(AxisPosition.LEFT);
    left.setCrossBetween(AxisCrossBetween.BETWEEN);
    left.setCrosses(AxisCrosses.AUTO_ZERO);
    left.setNumberFormat("0");
    style(bottom);
    style(left);
    grid(left);
    XDDFBarChartData data = (XDDFBarChartData) chart.createData(ChartTypes.BAR, bottom, left);
    data.setBarDirection(BarDirection.COL);
    data.setBarGrouping(BarGrouping.STACKED);
    data.setOverlap((byte) 100);
    data.setGapWidth(40);
    data.setVaryColors(false);
    for (ChartPlan.Part part : plan.parts()) {
      XDDFChartData.Series series =
          data.addSeries(
              XDDFDataSourcesFactory.fromArray(
                  plan.names().toArray(String[]::new), plan.categories()),
              numbers(part.cells()));
      series.setTitle(part.name());
      XDDFShapeProperties shape = new XDDFShapeProperties();
      shape.setFillProperties(fill(Palette.part(part.look())));
      shape.setLineProperties(line(Palette.INK, 0.5));
      series.setShapeProperties(shape);
    }
    chart.plot(data);
  }

  private static void scatter(XSSFChart chart, ChartPlan.Scatter plan) {
    XDDFValueAxis bottom = chart.createValueAxis(AxisPosition.BOTTOM);
    XDDFValueAxis left = chart.createValueAxis(AxisPosition.LEFT);
    bottom.setTitle(plan.xTitle());
    left.setTitle(plan.yTitle());
    bottom.setCrosses(AxisCrosses.AUTO_ZERO);
    left.setCrosses(AxisCrosses.AUTO_ZERO);
    style(bottom);
    style(left);
    grid(left);
    XDDFScatterChartData data =
        (XDDFScatterChartData) chart.createData(ChartTypes.SCATTER, bottom, left);
    data.setStyle(ScatterStyle.LINE_MARKER);
    data.setVaryColors(false);
    for (ChartPlan.Trace trace : plan.traces()) {
      XDDFScatterChartData.Series series =
          (XDDFScatterChartData.Series) data.addSeries(numbers(trace.x()), numbers(trace.y()));
      series.setTitle(trace.name());
      series.setSmooth(false);
      stroke(series, trace.stroke());
      trace.spread().forEach(spread -> bars(series, spread));
    }
    chart.plot(data);
  }

  private static void stroke(XDDFScatterChartData.Series series, ChartPlan.Stroke stroke) {
    switch (stroke) {
      case POINTS -> marks(series, MarkerStyle.CIRCLE, 7, fill(Palette.POINT));
      case CROSSES -> marks(series, MarkerStyle.X, 14, null);
      case LINE -> drawn(series, line(Palette.LINE, 1.5), MarkerStyle.NONE);
      case INTERVAL -> {
        drawn(series, line(Palette.part(Look.REVIEW), 4), MarkerStyle.DASH);
        series.setMarkerSize((short) 9);
      }
      default -> throw new IllegalStateException("no such stroke: " + stroke);
    }
  }

  private static void drawn(
      XDDFScatterChartData.Series series, XDDFLineProperties line, MarkerStyle marker) {
    series.setLineProperties(line);
    series.setMarkerStyle(marker);
  }

  /** Marks without a line; hollow where there is no fill. */
  private static void marks(
      XDDFScatterChartData.Series series,
      MarkerStyle marker,
      int size,
      XDDFSolidFillProperties fill) {
    XDDFLineProperties none = new XDDFLineProperties(new XDDFNoFillProperties());
    series.setLineProperties(none);
    series.setMarkerStyle(marker);
    series.setMarkerSize((short) size);
    XDDFShapeProperties shape = new XDDFShapeProperties();
    shape.setFillProperties(fill == null ? new XDDFNoFillProperties() : fill);
    shape.setLineProperties(line(fill == null ? "B3261E" : Palette.POINT, fill == null ? 2 : 0.75));
    var mark = series.getCTScatterSer().getMarker();
    mark.setSpPr(shape.getXmlObject());
  }

  private static void bars(XDDFScatterChartData.Series series, ChartPlan.Cells spread) {
    CTErrBars raw = series.getCTScatterSer().addNewErrBars();
    raw.addNewErrDir().setVal(STErrDir.Y);
    raw.addNewErrBarType().setVal(STErrBarType.BOTH);
    raw.addNewErrValType().setVal(STErrValType.CUST);
    raw.addNewNoEndCap().setVal(false);
    reference(raw.addNewPlus().addNewNumRef(), spread);
    reference(raw.addNewMinus().addNewNumRef(), spread);
    XDDFShapeProperties shape = new XDDFShapeProperties();
    shape.setLineProperties(line(Palette.POINT, 1));
    raw.setSpPr(shape.getXmlObject());
  }

  /** The bars' lengths; the setters of the library's own class expect what is not there yet. */
  private static void reference(CTNumRef target, ChartPlan.Cells cells) {
    target.setF(cells.range());
    CTNumData cache = target.addNewNumCache();
    cache.setFormatCode("General");
    cache.addNewPtCount().setVal(cells.cached().size());
    for (int i = 0; i < cells.cached().size(); i++) {
      if (Double.isFinite(cells.cached().get(i))) {
        CTNumVal point = cache.addNewPt();
        point.setIdx(i);
        point.setV(cells.cached().get(i).toString());
      }
    }
  }

  private static XDDFNumericalDataSource<Double> numbers(ChartPlan.Cells cells) {
    Double[] cached =
        cells.cached().stream()
            .map(value -> Double.isFinite(value) ? value : null)
            .toArray(Double[]::new);
    return XDDFDataSourcesFactory.fromArray(cached, cells.range());
  }

  private static void style(XDDFChartAxis axis) {
    axis.setTickLabelPosition(AxisTickLabelPosition.LOW);
    axis.setVisible(true);
    axis.getOrAddShapeProperties().setLineProperties(line(Palette.FAINT_INK, 1));
  }

  private static void grid(XDDFValueAxis axis) {
    XDDFLineProperties dashed = line(Palette.GRID, 0.75);
    dashed.setPresetDash(new XDDFPresetLineDash(PresetLineDash.SOLID));
    axis.getOrAddMajorGridProperties().setLineProperties(dashed);
  }

  private static XDDFSolidFillProperties fill(String hex) {
    return new XDDFSolidFillProperties(XDDFColor.from(Palette.rgb(hex)));
  }

  private static XDDFLineProperties line(String hex, double points) {
    XDDFLineProperties line = new XDDFLineProperties(fill(hex));
    line.setWidth(points);
    return line;
  }
}
