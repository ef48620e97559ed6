package org.spikewright.summary;

/**
 * The worksheet formulas of one series, over its flask rows (x in column D, signal used in J) and
 * its stored row (t in K, factors in M to P).
 *
 * @param firstFlask row, from 1
 * @param lastFlask row, from 1
 * @param stored row of the stored numbers; the live ones stand below it
 */
record LiveFormulas(int firstFlask, int lastFlask, int stored) {

  String slope() {
    return "SLOPE(" + y() + "," + x() + ")";
  }

  String intercept() {
    return "INTERCEPT(" + y() + "," + x() + ")";
  }

  String residualSd() {
    String squares = "(" + y() + "-" + live('C') + "-" + live('B') + "*" + x() + ")^2";
    return "SQRT(SUMPRODUCT(ISNUMBER(" + y() + ")*" + squares + ")/(" + live('J') + "-2))";
  }

  String onAxis() {
    return live('C') + "/" + live('B');
  }

  String result() {
    return toResult(live('E'));
  }

  String standardError() {
    String root = "SQRT(1/" + live('J') + "+" + centre() + "^2/" + devsq() + ")";
    return live('D') + "/ABS(" + live('B') + ")*" + root + "*" + factor();
  }

  /** Lower ({@code -}) or upper ({@code +}) end of Fieller's interval. */
  String end(char sign) {
    String rest = "(1-" + live('L') + ")";
    String root = "SQRT(" + rest + "/" + live('J') + "+" + centre() + "^2/" + devsq() + ")";
    String half = "ABS(" + ratio() + ")*" + root;
    return toResult("((" + centre() + sign + half + ")/" + rest + "-AVERAGE(" + x() + "))");
  }

  String count() {
    return "COUNT(" + y() + ")";
  }

  String t() {
    return "TINV(0.05," + live('J') + "-2)";
  }

  String g() {
    return "(" + ratio() + ")^2/" + devsq();
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

  /** Whether stored and live number of a column agree. */
  String check(char column, String size) {
    String was = "" + column + stored;
    String difference = "ABS(" + live(column) + "-" + was + ")";
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

  private String toResult(String onAxis) {
    return "(" + onAxis + "*M" + stored + "-N" + stored + ")*O" + stored + "*P" + stored;
  }

  private String factor() {
    return "M" + stored + "*O" + stored + "*P" + stored;
  }

  private String centre() {
    return "(AVERAGE(" + y() + ")/" + live('B') + ")";
  }

  private String ratio() {
    return "K" + stored + "*" + live('D') + "/" + live('B');
  }

  private String devsq() {
    return "DEVSQ(" + x() + ")";
  }

  private String live(char column) {
    return "" + column + (stored + 1);
  }

  private String x() {
    return "D" + firstFlask + ":D" + lastFlask;
  }

  private String y() {
    return "J" + firstFlask + ":J" + lastFlask;
  }
}
