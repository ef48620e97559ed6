package org.spikewright.series;

import java.util.Arrays;
import java.util.List;
import java.util.Optional;
import java.util.function.ToDoubleFunction;
import org.spikewright.quantity.Measured;
import org.spikewright.quantity.Quantity;
import org.spikewright.quantity.Unit;
import org.spikewright.reading.Addition;
import org.spikewright.reading.Addition.OfStock;
import org.spikewright.reading.Addition.Stated;
import org.spikewright.reading.FlaskFacts;

/**
 * Where each flask of a series stands on the concentration axis, and by what factor its signal is
 * multiplied for its volume. The axis is the addition referred to the aliquot, so that the
 * x-intercept is minus the concentration in the solution that was aliquoted. Source of the forms
 * for one vessel: Bader, J. Chem. Educ. 57 (1980) 703.
 *
 * @param unit of every {@code x}
 * @param x additions, in the order of the flasks
 * @param factor volume factors, in the same order; exactly 1 where all volumes are equal
 * @param dilution flask volume over aliquot where additions are stated in flask terms; otherwise 1
 * @param measured by how much larger a concentration is on the axis than in the measured solution:
 *     mean final volume (or mass) over mean aliquot, in one vessel the start volume over the
 *     aliquot; 1 where additions are stated in flask terms, where the volumes are not known, and
 *     where the internal standard was weighed in, whose ratio refers to the aliquot itself
 */
record Axis(Unit unit, double[] x, double[] factor, double dilution, double measured) {

  /** Places flasks that passed {@link AxisCheck}. */
  static Axis of(List<FlaskFacts> flasks) {
    return switch (flasks.get(0).design()) {
      case MADE_UP, WEIGHED -> madeUp(flasks);
      case ONE_VESSEL, ELECTRODE -> vessel(flasks);
      case STATED -> stated(flasks);
    };
  }

  /** Each flask made up, by volume or by mass: x = C_s·v/V_x. */
  private static Axis madeUp(List<FlaskFacts> flasks) {
    Unit unit = unit(flasks.get(0));
    double[] x = each(flasks, facts -> spike(facts, unit, aliquot(facts)));
    boolean standardIsWeighed = VolumeFactor.isWeighedIn(flasks.get(0));
    return new Axis(
        unit, x, VolumeFactor.madeUp(flasks), 1, standardIsWeighed ? 1 : madeUpRatio(flasks));
  }

  /** Mean final volume over mean aliquot; 1 where one of them is not known. */
  private static double madeUpRatio(List<FlaskFacts> flasks) {
    double taken = 0;
    double total = 0;
    for (FlaskFacts facts : flasks) {
      if (facts.aliquot().isEmpty() || facts.finalVolume().isEmpty()) {
        return 1;
      }
      taken += inBase(facts.aliquot().get());
      total += inBase(facts.finalVolume().get());
    }
    return total / taken;
  }

  /** One vessel: x = C_s·Σv/V_x. */
  private static Axis vessel(List<FlaskFacts> flasks) {
    Unit unit = unit(flasks.get(0));
    Quantity start = startVolume(flasks).orElseThrow();
    Quantity aliquot = flasks.get(0).aliquot().map(Measured::quantity).orElse(start);
    double[] x = each(flasks, facts -> spike(facts, unit, aliquot));
    double measured = start.in(aliquot.unit()) / aliquot.value();
    return new Axis(unit, x, VolumeFactor.vessel(flasks, start), 1, measured);
  }

  private static Axis stated(List<FlaskFacts> flasks) {
    FlaskFacts first = flasks.get(0);
    Unit unit = unit(first);
    double[] x = each(flasks, facts -> facts.addition().amount().in(unit));
    double[] ones = each(flasks, facts -> 1);
    boolean inFlask = ((Stated) first.addition()).terms() == Addition.Terms.FLASK;
    double dilution =
        inFlask
            ? volume(first.finalVolume()).in(aliquot(first).unit()) / aliquot(first).value()
            : 1;
    return new Axis(unit, x, ones, dilution, inFlask ? 1 : madeUpRatio(flasks));
  }

  /**
   * The volume in one vessel before the first addition: as stated, else the volume measured when
   * nothing had been added, else a later volume less what had been added.
   */
  static Optional<Quantity> startVolume(List<FlaskFacts> flasks) {
    Optional<Measured> stated = flasks.stream().flatMap(f -> f.startVolume().stream()).findFirst();
    if (stated.isPresent()) {
      return stated.map(Measured::quantity);
    }
    Optional<FlaskFacts> least =
        flasks.stream()
            .filter(f -> f.finalVolume().isPresent())
            .min((a, b) -> Double.compare(added(a), added(b)));
    return least.map(
        facts -> {
          Quantity total = volume(facts.finalVolume());
          double added = facts.addition().amount().in(total.unit());
          return new Quantity(total.value() - added, total.unit());
        });
  }

  private static double added(FlaskFacts facts) {
    Quantity amount = facts.addition().amount();
    return amount.value() * amount.unit().perBase();
  }

  /** Σ C_s·v/V_x over the stocks that were added. */
  private static double spike(FlaskFacts facts, Unit unit, Quantity aliquot) {
    double solvent = facts.blanks().solvent().map(blank -> blank.in(unit)).orElse(0.0);
    double sum = 0;
    for (OfStock portion : facts.addition().portions()) {
      double stock = portion.stock().in(unit);
      sum += (stock + solvent) * portion.delivered().in(aliquot.unit()) / aliquot.value();
    }
    return sum;
  }

  /**
   * The unit of the axis that a flask leads to: the result's where that is a concentration of the
   * same kind, so that the axis reads as the result does; else its stock's, or that of its stated
   * addition.
   */
  static Unit unit(FlaskFacts facts) {
    List<OfStock> portions = facts.addition().portions();
    Unit added =
        portions.isEmpty()
            ? facts.addition().amount().unit()
            : portions.get(0).stock().quantity().unit();
    Unit asked = facts.method().resultUnit();
    return asked.dimension() == added.dimension() ? asked : added;
  }

  private static Quantity aliquot(FlaskFacts facts) {
    return volume(facts.aliquot());
  }

  private static Quantity volume(Optional<Measured> measured) {
    return measured.orElseThrow().quantity();
  }

  /** A value in the base unit of its dimension. */
  static double inBase(Measured measured) {
    return measured.quantity().value() * measured.quantity().unit().perBase();
  }

  static double[] each(List<FlaskFacts> flasks, ToDoubleFunction<FlaskFacts> number) {
    double[] numbers = new double[flasks.size()];
    Arrays.setAll(numbers, i -> number.applyAsDouble(flasks.get(i)));
    return numbers;
  }
}
