package org.spikewright.fit;

import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;
import org.apache.commons.math3.exception.MathIllegalArgumentException;
import org.apache.commons.math3.exception.MathIllegalStateException;
import org.apache.commons.math3.fitting.leastsquares.LeastSquaresBuilder;
import org.apache.commons.math3.fitting.leastsquares.LeastSquaresOptimizer.Optimum;
import org.apache.commons.math3.fitting.leastsquares.LevenbergMarquardtOptimizer;
import org.apache.commons.math3.linear.Array2DRowRealMatrix;
import org.apache.commons.math3.linear.ArrayRealVector;
import org.apache.commons.math3.linear.RealMatrix;
import org.apache.commons.math3.linear.RealVector;
import org.apache.commons.math3.util.Pair;

/**
 * The fit behind {@link KnownAdditions}. The concentration is fitted as the logarithm of its ratio
 * to the start value, which keeps it above 0, and the standard potential as the potential at the
 * mean logarithm, where it is independent of the slope.
 */
final class PotentialCurve {
  private static final int READINGS_FOR_SLOPE = 4;
  private static final int MOST_STEPS = 1000;

  /** A concentration this many times smaller or larger than the fitted one bounds nothing. */
  private static final double FAR = Math.log(1e6);

  private static final double LARGEST = 1e75;

  private final KnownAdditions.Vessel vessel;
  private final double[] amount;
  private final double[] volume;
  private final double[] potential;
  private final boolean free;
  private final int df;

  PotentialCurve(KnownAdditions.Vessel vessel, List<KnownAdditions.Reading> readings) {
    this.vessel = vessel;
    amount = readings.stream().mapToDouble(KnownAdditions.Reading::amount).toArray();
    volume = readings.stream().mapToDouble(r -> vessel.startVolume() + r.volume()).toArray();
    potential = readings.stream().mapToDouble(KnownAdditions.Reading::potential).toArray();
    free = readings.size() >= READINGS_FOR_SLOPE;
    df = readings.size() - (free ? 3 : 2);
  }

  KnownAdditions fitted() {
    Optional<String> refusal = refusal();
    if (refusal.isPresent()) {
      return new KnownAdditions.Refused(refusal.get());
    }
    double slope = free ? vessel.expectedSlope() : vessel.measuredSlope().orElseThrow();
    OptionalDouble start = gran(slope);
    if (start.isEmpty()) {
      return new KnownAdditions.Refused(
          "the potentials do not move with the additions as the ion's charge says");
    }
    try {
      Curve curve = new Curve(start.getAsDouble(), slope);
      return curve.result(curve.optimum());
    } catch (MathIllegalStateException | MathIllegalArgumentException e) {
      return new KnownAdditions.Refused("no curve can be fitted to the potentials");
    }
  }

  private Optional<String> refusal() {
    double largest = 0;
    int distinct = 0;
    for (int i = 0; i < potential.length; i++) {
      boolean ordinary =
          amount[i] >= 0 && volume[i] >= vessel.startVolume() && Double.isFinite(potential[i]);
      if (!(ordinary && amount[i] <= LARGEST && volume[i] <= LARGEST)
          || Math.abs(potential[i]) > 1e6) {
        return Optional.of("an addition or a potential is out of range or not a number");
      }
      largest = Math.max(largest, amount[i]);
      boolean seen = false;
      for (int j = 0; j < i; j++) {
        seen |= amount[j] == amount[i] && volume[j] == volume[i];
      }
      distinct += seen ? 0 : 1;
    }
    if (distinct < 2 || !(largest > 1 / LARGEST)) {
      return Optional.of("fewer than two different additions have a potential");
    }
    if (!free && vessel.measuredSlope().isEmpty()) {
      return Optional.of(
          "the slope can be fitted with 4 readings or more, found "
              + potential.length
              + "; with fewer a measured slope is needed");
    }
    return free && distinct < 3
        ? Optional.of("fewer than three different additions have a potential")
        : Optional.empty();
  }

  /** C_x where Gran's line, volume·10^(E/S) over the amount, meets zero. */
  private OptionalDouble gran(double slope) {
    double top = Double.NEGATIVE_INFINITY;
    for (double e : potential) {
      top = Math.max(top, e / slope);
    }
    double[] y = new double[potential.length];
    for (int i = 0; i < y.length; i++) {
      y[i] = volume[i] / vessel.startVolume() * Math.pow(10, potential[i] / slope - top);
    }
    if (!(StraightLine.fit(amount, y) instanceof StraightLine line) || !(line.slope() > 0)) {
      return OptionalDouble.empty();
    }
    double most = StraightLine.mean(amount) / vessel.aliquot();
    // A slope far from theory makes the intercept wild; the fit needs no more than a place to
    // begin.
    double intercept = line.signalIntercept() / line.slope() / vessel.aliquot();
    return OptionalDouble.of(Math.max(intercept, most / 100));
  }

  /** The curve in (potential at the mean logarithm, ln(C_x/start) and, where free, slope). */
  private final class Curve {
    private final double start;
    private final double startSlope;

    Curve(double start, double startSlope) {
      this.start = start;
      this.startSlope = startSlope;
    }

    private double concentration(double p) {
      return start * Math.exp(p);
    }

    /** Decimal logarithm of the concentration in the vessel at a reading. */
    private double decades(int i, double p) {
      return Math.log10((concentration(p) * vessel.aliquot() + amount[i]) / volume[i]);
    }

    /** What a unit of ln C_x does to the decades at a reading. */
    private double decadesByP(int i, double p) {
      double own = concentration(p) * vessel.aliquot();
      return own / (own + amount[i]) / Math.log(10);
    }

    private double[] decades(double p) {
      double[] decades = new double[potential.length];
      for (int i = 0; i < decades.length; i++) {
        decades[i] = decades(i, p);
      }
      return decades;
    }

    Optimum optimum() {
      double[] begin = {StraightLine.mean(potential), 0, startSlope};
      return new LevenbergMarquardtOptimizer()
          .withCostRelativeTolerance(1e-15)
          .withParameterRelativeTolerance(1e-14)
          .withOrthoTolerance(1e-15)
          .optimize(
              new LeastSquaresBuilder()
                  .start(free ? begin : new double[] {begin[0], begin[1]})
                  .target(potential)
                  .model(this::valueAndJacobian)
                  .maxEvaluations(MOST_STEPS)
                  .maxIterations(MOST_STEPS)
                  .build());
    }

    private Pair<RealVector, RealMatrix> valueAndJacobian(RealVector at) {
      double p = at.getEntry(1);
      double slope = free ? at.getEntry(2) : startSlope;
      double[] decades = decades(p);
      double mean = StraightLine.mean(decades);
      int n = decades.length;
      double byPMean = 0;
      for (int i = 0; i < n; i++) {
        byPMean += decadesByP(i, p) / n;
      }
      double[] value = new double[n];
      double[][] jacobian = new double[n][free ? 3 : 2];
      for (int i = 0; i < n; i++) {
        value[i] = at.getEntry(0) + slope * (decades[i] - mean);
        jacobian[i][0] = 1;
        jacobian[i][1] = slope * (decadesByP(i, p) - byPMean);
        if (free) {
          jacobian[i][2] = decades[i] - mean;
        }
      }
      return new Pair<>(new ArrayRealVector(value), new Array2DRowRealMatrix(jacobian));
    }

    KnownAdditions result(Optimum optimum) {
      double p = optimum.getPoint().getEntry(1);
      double slope = free ? optimum.getPoint().getEntry(2) : startSlope;
      RealMatrix covariances = optimum.getCovariances(1e-14);
      double sd = df > 0 ? Math.max(optimum.getCost() / Math.sqrt(df), rounding()) : Double.NaN;
      double c = concentration(p);
      double e0 = optimum.getPoint().getEntry(0) - slope * StraightLine.mean(decades(p));
      double bySlope = free ? Double.NaN : bySlope(p, slope);
      boolean bounded = Math.abs(p) < FAR && c > 0 && Double.isFinite(c) && Double.isFinite(e0);
      if (!bounded || !(slope * startSlope > 0) || Double.isInfinite(bySlope)) {
        return new KnownAdditions.Refused("the potentials fit to no concentration above 0");
      }
      return new KnownAdditions.Fitted(
          c,
          known(sd * c * Math.sqrt(covariances.getEntry(1, 1))),
          known(end(p, sd, -1)),
          known(end(p, sd, 1)),
          slope,
          known(free ? sd * Math.sqrt(covariances.getEntry(2, 2)) : Double.NaN),
          known(bySlope),
          vessel.theoreticalSlope(),
          e0,
          known(df > 0 ? optimum.getCost() / Math.sqrt(df) : Double.NaN),
          df);
    }

    /** dC_x/dS with the slope given: Gauss-Newton, exact where the curve meets the readings. */
    private double bySlope(double p, double slope) {
      double[] decades = decades(p);
      double mean = StraightLine.mean(decades);
      double byPMean = 0;
      for (int i = 0; i < decades.length; i++) {
        byPMean += decadesByP(i, p) / decades.length;
      }
      double cross = 0;
      double own = 0;
      for (int i = 0; i < decades.length; i++) {
        double u = decadesByP(i, p) - byPMean;
        cross += u * (decades[i] - mean);
        own += u * u;
      }
      return -concentration(p) * cross / (own * slope);
    }

    /**
     * Where the profile of the sum of squares, least over the other parameters, has risen by t²·s²;
     * not a number where it does not within a factor of a million.
     */
    private double end(double p, double sd, int direction) {
      if (!(df > 0)) {
        return Double.NaN;
      }
      double t = StudentT.quantile(0.975, df);
      double limit = profile(p) + t * sd * (t * sd);
      double inside = 0;
      double outside = 1e-12;
      while (!(profile(p + direction * outside) > limit)) {
        inside = outside;
        outside *= 1.5;
        if (!(outside < FAR)) {
          return Double.NaN;
        }
      }
      for (int step = 0; step < 60; step++) {
        double middle = (inside + outside) / 2;
        if (profile(p + direction * middle) > limit) {
          outside = middle;
        } else {
          inside = middle;
        }
      }
      return concentration(p + direction * inside);
    }

    /** The sum of squares with this concentration and the best other parameters. */
    private double profile(double p) {
      double[] decades = decades(p);
      double mean = StraightLine.mean(decades);
      double level = StraightLine.mean(potential);
      double cross = 0;
      double own = 0;
      for (int i = 0; i < decades.length; i++) {
        cross += (decades[i] - mean) * (potential[i] - level);
        own += (decades[i] - mean) * (decades[i] - mean);
      }
      double slope = free ? cross / own : startSlope;
      double squares = 0;
      for (int i = 0; i < decades.length; i++) {
        double e = potential[i] - level - slope * (decades[i] - mean);
        squares += e * e;
      }
      return squares;
    }
  }

  private double rounding() {
    double largest = 0;
    for (double e : potential) {
      largest = Math.max(largest, Math.abs(e));
    }
    return 4 * Math.ulp(largest);
  }

  private static OptionalDouble known(double value) {
    return Double.isFinite(value) ? OptionalDouble.of(value) : OptionalDouble.empty();
  }
}
