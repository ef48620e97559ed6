package org.spikewright.judgement;

import java.math.BigDecimal;
import java.math.MathContext;
import java.util.ArrayList;
import java.util.Comparator;
import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;
import org.spikewright.judgement.RepeatAsk.MadeUp;
import org.spikewright.judgement.RepeatAsk.OneVessel;
import org.spikewright.judgement.RepeatAsk.Stated;
import org.spikewright.judgement.RepeatAsk.Stock;

/**
 * Finds a stock and a step between additions that the bench can deliver: all additions are whole
 * multiples of one round amount.
 */
final class Deliveries {
  /** Round amounts within a decade. */
  private static final double[] ROUND = {1, 1.2, 1.5, 1.6, 2, 2.5, 3, 4, 5, 6, 7.5, 8};

  /** What a change of pipette within a series, or a number that is not round, is worth. */
  private static final double MIXED = 0.3;

  private static final double ODD_NUMBER = 0.1;

  /** Slack of comparisons, for rounding alone. */
  private static final double SLACK = 1e-9;

  /**
   * A way to deliver the additions.
   *
   * @param stock empty where additions are stated
   * @param dilution of the stock
   * @param step the amount between two additions
   * @param perAmount concentration on the axis for one unit of amount
   * @param badness how far it is from what is wanted
   */
  record Delivery(
      Optional<Stock> stock, double dilution, double step, double perAmount, double badness) {}

  /**
   * What is looked for.
   *
   * @param steps between the lowest and the highest level
   * @param nativeConcentration in the aliquot
   * @param leastTop least top addition over native
   * @param mostTop most
   */
  record Wanted(int steps, double nativeConcentration, double leastTop, double mostTop) {}

  private final RepeatAsk ask;

  Deliveries(RepeatAsk ask) {
    this.ask = ask;
  }

  /** The best delivery with the least dilution of a stock; empty when there is none. */
  Optional<Delivery> find(Wanted wanted) {
    if (ask.vessel() instanceof Stated) {
      return best(Optional.empty(), 1, wanted);
    }
    for (double dilution : Planner.ladder(ask.caps().largestStockDilution())) {
      Optional<Delivery> found =
          ask.stocks().stream()
              .flatMap(stock -> best(Optional.of(stock), dilution, wanted).stream())
              .min(Comparator.comparingDouble(Delivery::badness));
      if (found.isPresent()) {
        return found;
      }
    }
    return Optional.empty();
  }

  private Optional<Delivery> best(Optional<Stock> stock, double dilution, Wanted wanted) {
    double perAmount =
        stock.map(Stock::concentration).orElse(1.0) / dilution / ask.vessel().aliquot();
    double native0 = wanted.nativeConcentration();
    double least = wanted.leastTop() * native0 / perAmount;
    double most = Math.min(wanted.mostTop() * native0 / perAmount, room());
    if (!(least <= most)) {
      return Optional.empty();
    }
    double aim = Math.max(wanted.leastTop(), Math.min(wanted.mostTop(), ask.caps().topAddition()));
    Delivery best = null;
    for (double step : steps(least / wanted.steps(), most / wanted.steps())) {
      double badness = handling(step, wanted.steps());
      badness += Math.abs(Math.log(step * wanted.steps() * perAmount / native0 / aim));
      badness += isRound(step) ? 0 : ODD_NUMBER;
      if (badness < Double.POSITIVE_INFINITY && (best == null || badness < best.badness())) {
        best = new Delivery(stock, dilution, step, perAmount, badness);
      }
    }
    return Optional.ofNullable(best);
  }

  /** The most that may be added in all, in units of amount. */
  double room() {
    if (ask.vessel() instanceof OneVessel vessel) {
      return ask.caps().largestShare() * vessel.start();
    }
    if (ask.vessel() instanceof MadeUp flask && flask.finalVolume().isPresent()) {
      return flask.finalVolume().getAsDouble() - flask.aliquot();
    }
    return Double.MAX_VALUE;
  }

  /** Amounts between two bounds: the round ones, else what the pipettes' dials allow. */
  private List<Double> steps(double least, double most) {
    List<Double> steps = new ArrayList<>();
    int decade = (int) Math.floor(Math.log10(least));
    for (int power = decade; power <= Math.floor(Math.log10(most)); power++) {
      for (double round : ROUND) {
        addInside(tidy(round * Math.pow(10, power)), least, most, steps);
      }
    }
    double middle = Math.sqrt(least * most);
    for (Pipette pipette : ask.caps().pipettes()) {
      double turns = Math.rint(middle / pipette.increment());
      addInside(tidy(turns * pipette.increment()), least, most, steps);
    }
    if (ask.vessel() instanceof Stated && steps.isEmpty()) {
      steps.add(middle);
    }
    return steps;
  }

  private static void addInside(double step, double least, double most, List<Double> steps) {
    if (step >= least && step <= most && step > 0) {
      steps.add(step);
    }
  }

  /** The nearest number of few digits, so that 0.30000000000000004 stays out of the plan. */
  static double tidy(double value) {
    return BigDecimal.valueOf(value).round(new MathContext(10)).doubleValue();
  }

  private static boolean isRound(double step) {
    double mantissa = step / Math.pow(10, Math.floor(Math.log10(step) + SLACK));
    for (double round : ROUND) {
      if (Math.abs(mantissa - round) < 1e-6) {
        return true;
      }
    }
    return false;
  }

  /** 0 when one pipette delivers all, more when several do, infinite when none can. */
  private double handling(double step, int steps) {
    if (ask.vessel() instanceof Stated) {
      return 0;
    }
    int each = ask.vessel() instanceof OneVessel ? 1 : steps;
    for (Pipette pipette : ask.caps().pipettes()) {
      boolean all = true;
      for (int i = 1; i <= each; i++) {
        all &= pipette.delivers(step * i);
      }
      if (all) {
        return 0;
      }
    }
    for (int i = 1; i <= each; i++) {
      if (pipette(ask.caps(), step * i).isEmpty()) {
        return Double.POSITIVE_INFINITY;
      }
    }
    return MIXED;
  }

  /** The finest pipette that delivers a volume. */
  static Optional<Pipette> pipette(RepeatCaps caps, double volume) {
    return caps.pipettes().stream()
        .filter(pipette -> pipette.delivers(volume))
        .min(Comparator.comparingDouble(Pipette::highest));
  }

  /** Why {@link #find} found nothing. */
  RepeatPlan.Refused refusal(Wanted wanted) {
    return new DeliveryRefusal(ask, room()).of(wanted);
  }

  /** The largest total that pipettes can add, in µL. */
  static OptionalDouble reach(RepeatAsk ask, int steps) {
    OptionalDouble highest = ask.caps().highestVolume();
    return highest.isPresent() && ask.vessel() instanceof OneVessel
        ? OptionalDouble.of(highest.getAsDouble() * steps)
        : highest;
  }
}
