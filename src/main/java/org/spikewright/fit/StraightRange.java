package org.spikewright.fit;

import java.util.OptionalDouble;

/** How far up a bent line may still be used as a straight one. */
public final class StraightRange {
  private StraightRange() {}

  /**
   * The signal at which the parabola has fallen below its own tangent at zero signal by a share of
   * the tangent. With z the concentration counted from where the parabola meets zero, y = αz − βz²,
   * the share is βz/α and the signal there is share·(1 − share)·α²/β.
   *
   * <p>A straight line fitted up to there, from flasks spread evenly up to a top addition of r
   * times the native concentration, gives a result too high by share·(1 + 4(1+r) + (1+r)²)/(6(1+r))
   * over 1 − share·(2+r)/(1+r): 1.2 to 1.4 times the share for r of 1.5 to 3 and shares of a few
   * percent.
   *
   * @param parabola through the flasks
   * @param share above 0 and below 0.5
   * @return the signal; empty when the parabola does not bend towards saturation or does not reach
   *     zero signal
   */
  public static OptionalDouble upTo(QuadraticFit parabola, double share) {
    double bend = -parabola.c2();
    double tangentSquared = parabola.c1() * parabola.c1() + 4 * parabola.c0() * bend;
    double signal = share * (1 - share) * tangentSquared / bend;
    return bend > 0 && tangentSquared > 0 && Double.isFinite(signal)
        ? OptionalDouble.of(signal)
        : OptionalDouble.empty();
  }

  /** Slope of the parabola where its signal is zero; empty when it does not reach zero signal. */
  public static OptionalDouble slopeAtZero(QuadraticFit parabola) {
    double squared = parabola.c1() * parabola.c1() - 4 * parabola.c0() * parabola.c2();
    return squared > 0 && Double.isFinite(squared)
        ? OptionalDouble.of(Math.sqrt(squared))
        : OptionalDouble.empty();
  }
}
