package org.spikewright.fit;

/** Least squares on two columns of any kind, by orthogonalisation done twice. */
final class TwoColumns {
  private TwoColumns() {}

  /** The factors of both columns; not finite when the columns are one. */
  static double[] fit(double[] first, double[] second, double[] y) {
    double own = dot(first, first);
    double[] rest = second.clone();
    double along = 0;
    for (int round = 0; round < 2; round++) {
      double part = dot(first, rest) / own;
      along += part;
      for (int i = 0; i < rest.length; i++) {
        rest[i] -= part * first[i];
      }
    }
    double level = dot(first, y) / own;
    double slope = 0;
    for (int i = 0; i < rest.length; i++) {
      slope += rest[i] * (y[i] - level * first[i]);
    }
    slope /= dot(rest, rest);
    return new double[] {level - slope * along, slope};
  }

  static double dot(double[] a, double[] b) {
    double sum = 0;
    for (int i = 0; i < a.length; i++) {
      sum += a[i] * b[i];
    }
    return sum;
  }
}
