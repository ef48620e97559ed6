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
 *     mean final volume over mean aliquot, in one vessel the start volume over the aliquot; 1 where
 *     additions are stated in flask terms, or where the volumes are not known
 */
record Axis(Unit unit, double[] x, double[] factor, double dilution, double measured) {

  private static final Unit LITRE = Unit.of("L");

  /** Places flasks that passed {@link AxisCheck}. */
  static Axis of(List<FlaskFacts> flasks) {
    return switch (flasks.get(0).design()) {
      case MADE_UP -> madeUp(flasks);
      case ONE_VESSEL -> oneVessel(flasks);
      case STATED -> stated(flasks);
    };
  }

  /** Each flask made up: x = C_s·v/V_x, factor (V_t/V_x)·(mean V_x/mean V_t). */
  private static Axis madeUp(List<FlaskFacts> flasks) {
    Unit unit = unit(flasks.get(0));
    double[] x = each(flasks, facts -> spike(facts, unit, aliquot(facts)));
    return new Axis(unit, x, madeUpFactors(flasks), 1, madeUpRatio(flasks));
  }

  /** Mean final volume over mean aliquot; 1 where one of them is not known. */
  private static double madeUpRatio(List<FlaskFacts> flasks) {
    double taken = 0;
    double total = 0;
    for (FlaskFacts facts : flasks) {
      if (facts.aliquot().isEmpty() || facts.finalVolume().isEmpty()) {
        return 1;
      }
      taken += base(facts.aliquot().get());
      total += base(facts.finalVolume().get());
    }
    return total / taken;
  }

  private static double base(Measured measured) {
    return measured.quantity().value() * measured.quantity().unit().perBase();
  }

  private static double[] madeUpFactors(List<FlaskFacts> flasks) {
    Unit volume = aliquot(flasks.get(0)).unit();
    double[] taken = each(flasks, facts -> aliquot(facts).in(volume));
    double[] total =
        flasks.get(0).finalVolume().isPresent()
            ? each(flasks, facts -> volume(facts.finalVolume()).in(volume))
            : each(flasks, facts -> 1);
    double[] factor = new double[taken.length];
    if (allEqual(taken) && allEqual(total)) {
      Arrays.fill(factor, 1);
      return factor;
    }
    double ratio = Arrays.stream(taken).sum() / Arrays.stream(total).sum();
    for (int i = 0; i < factor.length; i++) {
      factor[i] = total[i] / taken[i] * ratio;
    }
    return factor;
  }

  /** One vessel: x = C_s·Σv/V_x, factor (V_0 + Σv)/V_0. */
  private static Axis oneVessel(List<FlaskFacts> flasks) {
    Unit unit = unit(flasks.get(0));
    Quantity start = startVolume(flasks).orElseThrow();
    Quantity aliquot = flasks.get(0).aliquot().map(Measured::quantity).orElse(start);
    double[] x = each(flasks, facts -> spike(facts, unit, aliquot));
    double[] factor =
        each(flasks, facts -> 1 + facts.addition().amount().in(start.unit()) / start.value());
    return new Axis(unit, x, factor, 1, start.in(aliquot.unit()) / aliquot.value());
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
    return facts.addition().amount().in(LITRE);
  }

  private static double spike(FlaskFacts facts, Unit unit, Quantity aliquot) {
    OfStock addition = (OfStock) facts.addition();
    double stock = addition.stock().in(unit);
    double solvent = facts.blanks().solvent().map(blank -> blank.in(unit)).orElse(0.0);
    return (stock + solvent) * addition.volume().in(aliquot.unit()) / aliquot.value();
  }

  /**
   * The unit of the axis that a flask leads to: the result's where that is a concentration of the
   * same kind, so that the axis reads as the result does; else its stock's, or that of its stated
   * addition.
   */
  static Unit unit(FlaskFacts facts) {
    Unit added =
        facts.addition() instanceof OfStock spike
            ? spike.stock().quantity().unit()
            : facts.addition().amount().unit();
    Unit asked = facts.method().resultUnit();
    return asked.dimension() == added.dimension() ? asked : added;
  }

  private static Quantity aliquot(FlaskFacts facts) {
    return volume(facts.aliquot());
  }

  private static Quantity volume(Optional<Measured> measured) {
    return measured.orElseThrow().quantity();
  }

  private static boolean allEqual(double[] values) {
    for (double value : values) {
      if (value != values[0]) {
        return false;
      }
    }
    return true;
  }

  private static double[] each(List<FlaskFacts> flasks, ToDoubleFunction<FlaskFacts> number) {
    double[] numbers = new double[flasks.size()];
    for (int i = 0; i < numbers.length; i++) {
      numbers[i] = number.applyAsDouble(flasks.get(i));
    }
    return numbers;
  }
}
