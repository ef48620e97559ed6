package org.spikewright.summary;

/**
 * The worksheet formulas of one series, over its flask rows (x in column D, signal used in J,
 * weight in P) and its stored row (t in K, factors in M to P).
 *
 * @param firstFlask row, from 1
 * @param lastFlask row, from 1
 * @param stored row of the stored numbers; the live ones stand below it
 * @param weighted whether the flasks differ in weight, for which worksheets have no functions
 */
record LiveFormulas(int firstFlask, int lastFlask, int stored, boolean weighted) {

  /**
   * The cells that say how far a flask scatters.
   *
   * @param sd standard deviation of a flask of weight 1
   * @param t quantile of Student's t
   * @param g Fieller's
   */
  record Spread(String sd, String t, String g) {}

  /** The series' own residuals. */
  Spread own() {
    return new Spread(live('D'), "K" + stored, live('L'));
  }

  String slope() {
    return weighted
        ? "SUMPRODUCT(" + w() + "*" + away(x()) + "*" + away(y()) + ")/" + squares()
        : "SLOPE(" + y() + "," + x() + ")";
  }

  String intercept() {
    return weighted
        ? mean(y()) + "-" + live('B') + "*" + mean(x())
        : "INTERCEPT(" + y() + "," + x() + ")";
  }

  String residualSd() {
    String squares = "(" + y() + "-" + live('C') + "-" + live('B') + "*" + x() + ")^2";
    String each = weighted ? w() : "ISNUMBER(" + y() + ")";
    return "SQRT(SUMPRODUCT(" + each + "*" + squares + ")/(" + live('J') + "-2))";
  }

  String onAxis() {
    return live('C') + "/" + live('B');
  }

  String result() {
    return toResult(live('E'));
  }

  String standardError(Spread spread) {
    String root = "SQRT(1/" + weight() + "+" + centre() + "^2/" + squares() + ")";
    return spread.sd() + "/ABS(" + live('B') + ")*" + root + "*" + factor();
  }

  /** Lower ({@code -}) or upper ({@code +}) end of Fieller's interval. */
  String end(Spread spread, char sign) {
    String rest = "(1-" + spread.g() + ")";
    String root = "SQRT(" + rest + "/" + weight() + "+" + centre() + "^2/" + squares() + ")";
    String half = "ABS(" + ratio(spread) + ")*" + root;
    return toResult("((" + centre() + sign + half + ")/" + rest + "-" + mean(x()) + ")");
  }

  String count() {
    return "COUNT(" + y() + ")";
  }

  String t() {
    return "TINV(0.05," + live('J') + "-2)";
  }

  String g(Spread spread) {
    return "(" + ratio(spread) + ")^2/" + squares();
  }

  /** The largest signal, without its sign. */
  String topSignal() {
    return "MAX(MAX(" + y() + "),-MIN(" + y() + "))";
  }

  /** The largest addition. */
  String topX() {
    return "MAX(" + x() + ")";
  }

  /** The largest addition on the sample's scale. */
  String topOnSample() {
    return topX() + "*" + factor();
  }

  /** Whether the stored number of a row and the live one below it agree. */
  static String check(char column, int stored, String size) {
    String was = "" + column + stored;
    String difference = "ABS(" + column + (stored + 1) + "-" + was + ")";
    String allowed = "1E-9*MAX(ABS(" + was + ")," + size + ")";
    return "IF("
        + difference
        + "<="
        + allowed
        + ",\""
        + LiveCells.AGREES
        + "\",\""
        + LiveCells.DIFFERS
        + "\")";
  }

  /** A cell of the live row. */
  String live(char column) {
    return "" + column + (stored + 1);
  }

  private String toResult(String onAxis) {
    return "(" + onAxis + "*M" + stored + "-N" + stored + ")*O" + stored + "*P" + stored;
  }

  private String factor() {
    return "M" + stored + "*O" + stored + "*P" + stored;
  }

  private String centre() {
    return "(" + mean(y()) + "/" + live('B') + ")";
  }

  private String ratio(Spread spread) {
    return spread.t() + "*" + spread.sd() + "/" + live('B');
  }

  private String mean(String cells) {
    return weighted
        ? "SUMPRODUCT(" + w() + "," + cells + ")/" + weight()
        : "AVERAGE(" + cells + ")";
  }

  private String squares() {
    return weighted ? "SUMPRODUCT(" + w() + "*" + away(x()) + "^2)" : "DEVSQ(" + x() + ")";
  }

  private String away(String cells) {
    return "(" + cells + "-" + mean(cells) + ")";
  }

  private String weight() {
    return weighted ? "SUM(" + w() + ")" : live('J');
  }

  private String x() {
    return "D" + firstFlask + ":D" + lastFlask;
  }

  private String y() {
    return "J" + firstFlask + ":J" + lastFlask;
  }

  private String w() {
    return "P" + firstFlask + ":P" + lastFlask;
  }
}
