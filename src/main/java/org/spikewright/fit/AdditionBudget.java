package org.spikewright.fit;

import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import org.spikewright.fit.Preparation.Delivery;
import org.spikewright.fit.Preparation.Input;
import org.spikewright.fit.Preparation.OneVessel;
import org.spikewright.fit.Preparation.Part;

/**
 * What each input of a standard addition contributes to the uncertainty of its result.
 *
 * <p>Source: JCGM 100:2008 (GUM), 5.1.2; Eurachem/CITAC CG 4 (2012), 8.2. The derivatives of the
 * x-intercept by each point are those of ȳ/b − x̄, exact and at the points as measured.
 */
public final class AdditionBudget {
  private final StraightLine line;
  private final double nativeConcentration;
  private final Preparation preparation;

  private AdditionBudget(StraightLine line, double nativeConcentration, Preparation preparation) {
    this.line = line;
    this.nativeConcentration = nativeConcentration;
    this.preparation = preparation;
  }

  /**
   * The budget of a result.
   *
   * @param line unweighted; one vessel's in the order of its steps
   * @param nativeConcentration finite, in axis units; signal intercept over slope
   * @param fit standard uncertainty of it, in axis units, and its degrees of freedom; empty when
   *     the line has none
   * @param preparation everything else
   * @return in the unit of the result; empty when a number is too large to compute with
   * @throws IllegalArgumentException when a vessel has other than the line's number of points
   */
  public static Optional<Budget> of(
      StraightLine line, double nativeConcentration, Optional<Part> fit, Preparation preparation) {
    AdditionBudget made = new AdditionBudget(line, nativeConcentration, preparation);
    double toResult = preparation.dilution() * preparation.perSolution();
    double largest = fit.map(Part::standardUncertainty).orElse(0.0) * toResult;
    List<Effect> effects = made.effects(toResult);
    if (!Double.isFinite(largest) || !effects.stream().allMatch(e -> Double.isFinite(e.size()))) {
      return Optional.empty();
    }
    return Budget.of(
        fit.map(
            part ->
                Contribution.absolute(
                    "fit",
                    "scatter of the flasks about the line",
                    part.standardUncertainty() * toResult,
                    part.df())),
        effects.stream().filter(effect -> effect.size() != 0).map(Effect::contribution).toList());
  }

  private record Effect(String name, String what, double size, double df) {
    Contribution contribution() {
      return Contribution.absolute(name, what, size, df);
    }
  }

  private List<Effect> effects(double toResult) {
    double gross = nativeConcentration * toResult;
    double net = gross - preparation.blank() * preparation.perSolution();
    Optional<Vessel> vessel = preparation.vessel().map(this::vessel);
    double aliquot = vessel.map(Vessel::aliquotShare).orElse(0.0) * toResult - gross;
    double additions = vessel.map(Vessel::additionsShare).orElse(0.0) * toResult + gross;
    List<Effect> effects = new ArrayList<>();
    for (Input input : Input.values()) {
      double by =
          switch (input) {
            case STOCK, FINAL_VOLUME, DILUTION -> gross;
            case ALIQUOT -> aliquot;
            case ADDITIONS -> additions;
            case DIGEST_VOLUME -> net;
            case PORTION, DRY_MASS -> -net;
            case BLANK -> -preparation.perSolution();
          };
      Part part = preparation.parts().getOrDefault(input, Part.known(0));
      effects.add(new Effect(input.label, input.what, by * part.standardUncertainty(), part.df()));
    }
    vessel.ifPresent(
        v -> {
          effects.add(known("deliveries", "each addition's own error", v.deliveries() * toResult));
          effects.add(known("start volume", "volume before the first", v.start() * toResult));
        });
    return effects;
  }

  private static Effect known(String name, String what, double size) {
    return new Effect(name, what, size, Double.POSITIVE_INFINITY);
  }

  /**
   * What one vessel's volumes do to C_x, in axis units.
   *
   * @param aliquotShare beyond 1/aliquot, per relative change of the aliquot: it is part of the
   *     start volume
   * @param additionsShare beyond proportion, per relative change of all additions: they grow the
   *     volume
   * @param deliveries all deliveries' own errors in quadrature
   * @param start of what is in the vessel beside the aliquot
   */
  private record Vessel(
      double aliquotShare, double additionsShare, double deliveries, double start) {}

  private Vessel vessel(OneVessel filled) {
    int n = line.n();
    if (filled.added().size() != n
        || filled.deliveries().stream().anyMatch(delivery -> delivery.firstPoint() >= n)) {
      throw new IllegalArgumentException(n + " points, but " + filled);
    }
    double perStart = 0;
    double perAdded = 0;
    for (int j = 0; j < n; j++) {
      double grown = filled.added().get(j) / (filled.startVolume() + filled.added().get(j));
      double moved = bySignal(j) * line.y()[j] * grown;
      perAdded += moved;
      perStart -= moved / filled.startVolume();
    }
    double quadrature = 0;
    for (Delivery delivery : filled.deliveries()) {
      quadrature = Math.hypot(quadrature, delivered(filled, delivery));
    }
    double start = perStart * filled.otherUncertainty();
    return new Vessel(perStart * filled.aliquot(), perAdded, quadrature, start);
  }

  /** One delivery's own error: it moves x and the volume of its step and of all later ones. */
  private double delivered(OneVessel filled, Delivery delivery) {
    double sensitivity = 0;
    for (int j = delivery.firstPoint(); j < line.n(); j++) {
      double volume = filled.startVolume() + filled.added().get(j);
      sensitivity += byAddition(j) * delivery.perVolume() + bySignal(j) * (line.y()[j] / volume);
    }
    return sensitivity * delivery.standardUncertainty();
  }

  /** dC_x/dy_j, in axis units per signal. */
  private double bySignal(int j) {
    double b = line.slope();
    double centre = line.yMean() / b;
    return (1.0 / line.n() - centre * ((line.x()[j] - line.xMean()) / line.sxx())) / b;
  }

  /** dC_x/dx_j. */
  private double byAddition(int j) {
    double b = line.slope();
    double bent = (line.y()[j] - line.yMean()) / b - 2 * (line.x()[j] - line.xMean());
    return -line.yMean() / b * (bent / line.sxx()) - 1.0 / line.n();
  }
}
