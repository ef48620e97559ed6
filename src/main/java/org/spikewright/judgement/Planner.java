package org.spikewright.judgement;

import java.util.ArrayList;
import java.util.Comparator;
import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.stream.IntStream;
import org.spikewright.fit.Forecast;
import org.spikewright.judgement.Deliveries.Delivery;
import org.spikewright.judgement.Deliveries.Wanted;
import org.spikewright.judgement.RepeatAsk.Instrument;
import org.spikewright.judgement.RepeatAsk.OneVessel;
import org.spikewright.judgement.RepeatAsk.Stock;
import org.spikewright.judgement.RepeatAsk.Weighed;
import org.spikewright.judgement.RepeatPlan.Portion;
import org.spikewright.judgement.RepeatPlan.Prepared;
import org.spikewright.judgement.RepeatPlan.Refused;
import org.spikewright.judgement.RepeatPlan.StockUse;
import org.spikewright.quantity.Numbers;

/**
 * Plans a series of additions within caps: the sample as little diluted as the trusted signal
 * allows, levels evenly spaced, the top addition 1.5 to 3 times the native concentration, volumes
 * that a pipette delivers, and an order of measurement in which drift does not hide.
 */
public final class Planner {
  /** More levels than this say no more about a bend; further flasks repeat the levels. */
  private static final int MOST_LEVELS = 6;

  /** So many flasks, level by level. */
  private record Layout(int levels, int perLevel) {
    int flasks() {
      return levels * perLevel;
    }
  }

  private final RepeatAsk ask;
  private final Deliveries deliveries;

  private Planner(RepeatAsk ask) {
    this.ask = ask;
    this.deliveries = new Deliveries(ask);
  }

  /**
   * The plan with the fewest flasks that meets the target; where none does, the most certain one,
   * which says so; where no plan keeps to the caps, why.
   */
  public static RepeatPlan plan(RepeatAsk ask) {
    return new Planner(ask).plan();
  }

  /** Dilutions a bench makes in one go, from 1 to a limit: 1, 2, 5, 10, 20 … */
  static List<Double> ladder(double most) {
    List<Double> ladder = new ArrayList<>();
    for (double decade = 1; decade <= most; decade *= 10) {
      for (double step : new double[] {1, 2, 5}) {
        if (decade * step <= most) {
          ladder.add(decade * step);
        }
      }
    }
    return ladder;
  }

  private RepeatPlan plan() {
    Refused refused = null;
    Prepared best = null;
    for (Layout layout : layouts()) {
      RepeatPlan plan = plan(layout);
      if (plan instanceof Prepared prepared) {
        double uncertainty = prepared.forecast().relativeUncertainty();
        if (uncertainty <= ask.target().orElse(Double.MAX_VALUE)) {
          return ordered(prepared);
        }
        boolean better =
            best == null || uncertainty < best.forecast().relativeUncertainty() * (1 - 1e-9);
        best = better ? prepared : best;
      } else if (refused == null) {
        refused = (Refused) plan;
      }
    }
    return best != null ? ordered(best).with(missed(best)) : refused;
  }

  /** Layouts by rising number of flasks; without a target only those of the number wanted. */
  private List<Layout> layouts() {
    int wanted = ask.caps().flasks();
    int most = ask.target().isPresent() ? ask.caps().mostFlasks() : wanted;
    List<Layout> layouts = new ArrayList<>();
    if (ask.vessel() instanceof OneVessel) {
      IntStream.rangeClosed(wanted, most).forEach(levels -> layouts.add(new Layout(levels, 1)));
      return layouts;
    }
    if (wanted > MOST_LEVELS) {
      layouts.add(new Layout(wanted, 1));
    }
    for (int levels = RepeatCaps.FEWEST_FLASKS; levels <= MOST_LEVELS; levels++) {
      for (int each = 1; levels * each <= most; each++) {
        if (levels * each >= wanted) {
          layouts.add(new Layout(levels, each));
        }
      }
    }
    layouts.sort(
        Comparator.comparingInt(Layout::flasks)
            .thenComparing(Comparator.comparingInt(Layout::levels).reversed()));
    return layouts;
  }

  private RepeatPlan plan(Layout layout) {
    Refused undeliverable = null;
    for (double dilution : ladder(ask.caps().largestDilution())) {
      double most = mostTop(dilution);
      if (!(most >= RepeatCaps.LEAST_TOP)) {
        continue;
      }
      Wanted wanted =
          new Wanted(layout.levels() - 1, ask.estimate() / dilution, RepeatCaps.LEAST_TOP, most);
      Optional<Delivery> delivery = deliveries.find(wanted);
      if (delivery.isPresent()) {
        return prepared(layout, dilution, delivery.get());
      }
      undeliverable = undeliverable == null ? deliveries.refusal(wanted) : undeliverable;
    }
    return undeliverable != null ? undeliverable : overRange();
  }

  /** The most that the top addition may be times the native concentration. */
  private double mostTop(double dilution) {
    if (ask.instrument().isEmpty() || ask.instrument().get().mostSignal().isEmpty()) {
      return RepeatCaps.MOST_TOP;
    }
    double room = mostConcentration(ask.instrument().get()) - ask.highest() / dilution;
    return Math.min(RepeatCaps.MOST_TOP, room * dilution / ask.estimate());
  }

  private static double mostConcentration(Instrument instrument) {
    return (instrument.mostSignal().getAsDouble() - instrument.baseline()) / instrument.slope();
  }

  private Refused overRange() {
    Instrument instrument = ask.instrument().orElseThrow();
    double most = mostConcentration(instrument);
    double needed = (ask.highest() + RepeatCaps.LEAST_TOP * ask.estimate()) / most;
    boolean helps = needed > 0 && needed <= Double.MAX_VALUE;
    return new Refused(
        "largest dilution",
        "Even diluted "
            + Numbers.plain(ask.caps().largestDilution())
            + "-fold, the signal at the top addition would lie above the trusted "
            + Numbers.rounded(instrument.mostSignal().getAsDouble(), 3)
            + ".",
        helps
            ? "A dilution of the sample of at least " + Numbers.rounded(needed, 2) + "-fold."
            : "A trusted signal above the baseline.");
  }

  private RepeatPlan prepared(Layout layout, double dilution, Delivery delivery) {
    double native0 = ask.estimate() / dilution;
    List<Portion> portions = portions(layout, dilution, delivery);
    double[] x = portions.stream().mapToDouble(Portion::x).toArray();
    Forecast forecast =
        Forecast.of(x, native0, ask.noise()::at, ask.noise().borrowedDf()).orElseThrow();
    if (!(forecast.g() < 1)) {
      return new Refused(
          "scatter",
          "Flasks that scatter as they do would not establish the slope with "
              + x.length
              + " flasks (g = "
              + Flags.n(forecast.g())
              + ").",
          "Find the cause of the scatter first; more flasks help a little.");
    }
    return new Prepared(
        ask.unit(),
        ask.vessel(),
        dilution,
        delivery.stock().map(stock -> use(stock, delivery, portions)),
        native0,
        portions,
        List.of(),
        ask.caps().replicates(),
        x[x.length - 1] / native0,
        forecast,
        0,
        List.of());
  }

  /** The plan that was chosen, with the order in which its flasks are measured. */
  private Prepared ordered(Prepared plan) {
    double[] x = plan.portions().stream().mapToDouble(Portion::x).toArray();
    double[] pull = pulls(x, plan.nativeConcentration());
    boolean free = !(ask.vessel() instanceof OneVessel);
    int[] order = free ? MeasuringOrder.of(pull) : IntStream.range(0, x.length).toArray();
    double effect = 0.01 * MeasuringOrder.effect(pull, order);
    return plan.measured(
        IntStream.of(order).map(flask -> flask + 1).boxed().toList(), effect, remarks(effect));
  }

  private List<Portion> portions(Layout layout, double dilution, Delivery delivery) {
    boolean one = ask.vessel() instanceof OneVessel;
    List<Portion> portions = new ArrayList<>();
    for (int level = 0; level < layout.levels(); level++) {
      double total = Deliveries.tidy(delivery.step() * level);
      double amount = one && level > 0 ? delivery.step() : total;
      double x = total * delivery.perAmount();
      String pipette =
          amount > 0 && delivery.stock().isPresent()
              ? Deliveries.pipette(ask.caps(), amount).orElseThrow().toString()
              : "";
      OptionalDouble signal = signal(x + ask.estimate() / dilution, total);
      for (int each = 0; each < layout.perLevel(); each++) {
        portions.add(new Portion(portions.size() + 1, amount, x, pipette, signal));
      }
    }
    return portions;
  }

  private OptionalDouble signal(double concentration, double added) {
    double growth = ask.vessel() instanceof OneVessel vessel ? 1 + added / vessel.start() : 1;
    return ask.instrument()
        .map(tool -> OptionalDouble.of(tool.slope() * concentration / growth + tool.baseline()))
        .orElse(OptionalDouble.empty());
  }

  private static StockUse use(Stock stock, Delivery delivery, List<Portion> portions) {
    double needed = portions.stream().mapToDouble(Portion::amount).sum();
    return new StockUse(
        stock.name(), delivery.dilution(), stock.concentration() / delivery.dilution(), needed);
  }

  /** The relative change of the result for a relative change of each flask's signal. */
  private static double[] pulls(double[] x, double native0) {
    double[] pull = Forecast.influence(x, native0);
    for (int i = 0; i < pull.length; i++) {
      pull[i] *= (x[i] + native0) / native0;
    }
    return pull;
  }

  private List<String> remarks(double effect) {
    if (ask.vessel() instanceof OneVessel) {
      return List.of(
          "In one vessel the order is that of the additions: a drift of 1 % over them moves the"
              + " result by "
              + Numbers.rounded(100 * effect, 2)
              + " %, so measure a check solution before and after.");
    }
    return ask.vessel() instanceof Weighed
        ? List.of("Weigh what was delivered: the plan's masses are only aims.")
        : List.of();
  }

  private String missed(Prepared best) {
    double ratio = ask.target().orElseThrow() / best.forecast().relativeUncertainty();
    return "The target of "
        + Numbers.rounded(100 * ask.target().getAsDouble(), 2)
        + " % is not met with at most "
        + ask.caps().mostFlasks()
        + " flasks: it needs flasks that scatter "
        + Numbers.rounded(1 / ratio, 2)
        + " times less, or a larger top addition.";
  }
}
