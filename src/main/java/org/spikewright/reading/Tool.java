package org.spikewright.reading;

import java.util.List;
import java.util.Optional;
import org.spikewright.quantity.Dimension;
import org.spikewright.quantity.Numbers;
import org.spikewright.quantity.PlusMinus;
import org.spikewright.quantity.Quantity;
import org.spikewright.quantity.Unit;
import org.spikewright.reading.Accuracies.Accuracy;

/**
 * A named pipette, flask, burette or balance, and how well it measures.
 *
 * <p>Its errors are given as absolute numbers at one or more sizes and go linearly from one to the
 * next. Below the smallest they stay as they are there. What is larger than the tool takes several
 * strokes of equal size: their systematic errors add up, their random ones in quadrature.
 *
 * @param name as mappings and bench data call it
 * @param kind what it is
 * @param unit of all its numbers; of volume, or of mass for a balance
 * @param points its errors by size, sizes rising, at least one; one alone with {@code ranges} false
 *     is the nominal volume of a tool that knows no other
 * @param ranges whether it delivers everything between the first and the last size
 * @param means what the systematic error's number is
 * @param standard where the numbers come from, in words; may be empty
 */
public record Tool(
    String name,
    Kind kind,
    Unit unit,
    List<Point> points,
    boolean ranges,
    PlusMinus means,
    String standard) {

  /** Sizes that differ by less than this share are the same. */
  private static final double SAME = 1e-9;

  /** What a tool is. */
  public enum Kind {
    FLASK("flask"),
    PIPETTE("pipette"),
    PISTON_PIPETTE("piston pipette"),
    BURETTE("burette"),
    BALANCE("balance");

    private final String word;

    Kind(String word) {
      this.word = word;
    }

    /** The word used in the table of glassware. */
    public String word() {
      return word;
    }

    /** What it measures. */
    public Dimension dimension() {
      return this == BALANCE ? Dimension.MASS : Dimension.VOLUME;
    }
  }

  /**
   * The errors at one size, in the tool's unit.
   *
   * @param size above 0
   * @param systematic the number after ±, 0 or more
   * @param random standard deviation from one use to the next, 0 or more
   */
  public record Point(double size, double systematic, double random) {}

  /** Refuses what has no point or sizes that do not rise: {@link IllegalArgumentException}. */
  public Tool {
    points = List.copyOf(points);
    if (points.isEmpty() || ranges == (points.size() == 1)) {
      throw new IllegalArgumentException(name + ": " + points);
    }
    for (int i = 0; i < points.size(); i++) {
      if (!(points.get(i).size() > (i == 0 ? 0 : points.get(i - 1).size()))) {
        throw new IllegalArgumentException(name + ": sizes " + points);
      }
    }
  }

  /** The smallest quantity of its good range; of a tool of one volume, that volume. */
  public Quantity lowest() {
    return new Quantity(points.get(0).size(), unit);
  }

  /** The largest quantity that it measures in one go. */
  public Quantity highest() {
    return new Quantity(points.get(points.size() - 1).size(), unit);
  }

  /** Whether it measures this in one go, inside its good range. */
  public boolean holds(Quantity quantity) {
    if (quantity.unit().dimension() != unit.dimension()) {
      return false;
    }
    double size = quantity.in(unit);
    return size >= lowest().value() * (1 - SAME) && size <= highest().value() * (1 + SAME);
  }

  /**
   * Why this quantity cannot have been measured with it, as what it measures instead; empty when it
   * can. A quantity of 0 was not measured at all and is never refused.
   */
  public Optional<String> refusal(Quantity quantity) {
    if (quantity.unit().dimension() != unit.dimension()) {
      return Optional.of(unit.dimension().words());
    }
    double size = quantity.in(unit);
    if (size == 0 || isWhole(size)) {
      return Optional.empty();
    }
    boolean once = kind == Kind.FLASK || kind == Kind.BALANCE;
    if (!ranges) {
      return Optional.of(lowest() + (once ? "" : ", or a multiple of it"));
    }
    return once && !(size <= highest().value() * (1 + SAME))
        ? Optional.of(lowest() + " to " + highest())
        : Optional.empty();
  }

  /** Whether a tool of one volume gives the size in whole strokes. */
  private boolean isWhole(double size) {
    if (ranges) {
      return false;
    }
    double strokes = size / lowest().value();
    double whole = Math.rint(strokes);
    boolean once = kind == Kind.FLASK || kind == Kind.BALANCE;
    return whole >= 1 && (!once || whole == 1) && Math.abs(strokes - whole) <= whole * SAME;
  }

  /**
   * How well a quantity measured with it is known; empty for 0, which was not measured.
   *
   * @param quantity not refused by {@link #refusal}
   */
  public Optional<Accuracy> accuracy(Quantity quantity) {
    double size = quantity.in(unit);
    if (!(size > 0)) {
      return Optional.empty();
    }
    double strokes = strokes(quantity);
    Point at = at(size / strokes);
    return Optional.of(
        new Accuracy(
            means.standard(at.systematic()) / at.size(),
            at.random() / at.size() / Math.sqrt(strokes),
            origin(at, strokes)));
  }

  /** In how many goes a quantity is measured, 1 or more. */
  public double strokes(Quantity quantity) {
    return Math.max(1, Math.ceil(quantity.in(unit) / highest().value() * (1 - SAME)));
  }

  /** The errors at a size, linear between the points, level outside them. */
  private Point at(double size) {
    Point below = points.get(0);
    for (Point above : points) {
      if (size <= above.size()) {
        double share =
            above.equals(below)
                ? 1
                : Math.max(0, (size - below.size()) / (above.size() - below.size()));
        return new Point(
            size,
            below.systematic() + share * (above.systematic() - below.systematic()),
            below.random() + share * (above.random() - below.random()));
      }
      below = above;
    }
    return new Point(size, below.systematic(), below.random());
  }

  private String origin(Point at, double strokes) {
    StringBuilder words = new StringBuilder(name).append(": ± ").append(shown(at.systematic()));
    words.append(", ").append(means.words());
    if (at.random() > 0) {
      words.append("; random ").append(shown(at.random()));
    }
    if (strokes > 1) {
      words.append("; in ").append(Numbers.plain(strokes)).append(" strokes");
    }
    return standard.isEmpty() ? words.toString() : words.append("; ").append(standard).toString();
  }

  private String shown(double size) {
    double rounded = Double.parseDouble(Numbers.rounded(size, 3));
    return new Quantity(rounded, unit).toString();
  }
}
