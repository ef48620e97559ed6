package org.spikewright.judgement;

import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.Set;
import org.spikewright.fit.QuadraticFit;
import org.spikewright.fit.StraightRange;
import org.spikewright.judgement.RepeatAsk.Instrument;
import org.spikewright.judgement.RepeatAsk.MadeUp;
import org.spikewright.judgement.RepeatAsk.Noise;
import org.spikewright.judgement.RepeatAsk.OneVessel;
import org.spikewright.judgement.RepeatAsk.Stated;
import org.spikewright.judgement.RepeatAsk.Stock;
import org.spikewright.judgement.RepeatAsk.Vessel;
import org.spikewright.quantity.Dimension;
import org.spikewright.quantity.Measured;
import org.spikewright.quantity.Unit;
import org.spikewright.reading.Addition.OfStock;
import org.spikewright.reading.Design;
import org.spikewright.reading.FlaskFacts;
import org.spikewright.series.AdditionSeries;
import org.spikewright.series.Flask;

/**
 * How large a series must be laid out the next time, by what its first line says.
 *
 * @param needs of the series
 * @param estimate native concentration to plan for, on the axis; above 0
 * @param highest native concentration to leave room for
 * @param slope signal per axis unit
 * @param sd standard deviation of a flask on the axis; empty when nothing tells it
 * @param mostSignal largest signal to be used, as read
 * @param basis what the plan rests on, in a sentence
 */
record RepeatSizing(
    RepeatNeeds needs,
    double estimate,
    double highest,
    double slope,
    OptionalDouble sd,
    OptionalDouble mostSignal,
    String basis) {

  private static final Unit MICROLITRE = Unit.of("µL");

  /** Additions grow until Fieller's g falls to this: then the slope is well established. */
  private static final double GOOD_G = 0.05;

  /**
   * Sizes a series.
   *
   * @param flags those that count
   * @param straightShare share of its tangent that a bent line may have lost where the straight
   *     range ends
   * @return empty when the line gives no concentration above zero to plan for
   */
  static Optional<RepeatSizing> of(RepeatNeeds needs, Set<FlagKind> flags, double straightShare) {
    boolean bends =
        flags.contains(FlagKind.BENT)
            || flags.contains(FlagKind.ODD_FLASK) && new FlaskRepairs(needs).oddFlask().isEmpty();
    Optional<RepeatSizing> bent =
        bends
            ? QuadraticFit.of(needs.line()).flatMap(bow -> bent(needs, bow, straightShare))
            : Optional.empty();
    Optional<RepeatSizing> found =
        bent.or(
            () ->
                flags.contains(FlagKind.SLOPE_NOT_ESTABLISHED)
                    ? scattered(needs)
                    : straight(needs));
    return found.map(sizing -> flags.contains(FlagKind.OVER_RANGE) ? sizing.readSoFar() : sizing);
  }

  private static Optional<RepeatSizing> straight(RepeatNeeds needs) {
    boolean detected = needs.estimate() >= needs.floor();
    return sized(
        needs,
        Math.max(needs.estimate(), needs.floor()),
        needs.half().orElse(0),
        detected
            ? "Sized by the straight line's result."
            : "Sized by the detection limit, since nothing was found.");
  }

  /** Where the slope is lost in the scatter, larger additions bring g down with their square. */
  private static Optional<RepeatSizing> scattered(RepeatNeeds needs) {
    double growth = Math.sqrt(needs.g().orElse(0) / GOOD_G);
    double top = needs.topAddition() * Math.max(1, growth);
    return sized(
        needs,
        Math.max(needs.estimate(), top / RepeatCaps.DEFAULTS.topAddition()),
        0,
        "Sized so that additions establish the slope against the scatter seen; the native"
            + " concentration is a guess. Look for the cause of the scatter first.");
  }

  private static Optional<RepeatSizing> sized(
      RepeatNeeds needs, double estimate, double half, String basis) {
    double slope = needs.line().slope();
    if (!(estimate > 0 && slope > 0 && estimate <= Double.MAX_VALUE / 2)) {
      return Optional.empty();
    }
    double least = Resolution.of(needs.flasks());
    OptionalDouble sd =
        needs.sd().isPresent()
            ? OptionalDouble.of(Math.max(needs.sd().getAsDouble(), least) / slope)
            : OptionalDouble.empty();
    return Optional.of(
        new RepeatSizing(
            needs,
            estimate,
            Math.min(estimate + half, 2 * estimate),
            slope,
            sd,
            needs.series().method().trustedSignal(),
            basis));
  }

  /** A bent line is followed down to where it is straight. */
  private static Optional<RepeatSizing> bent(RepeatNeeds needs, QuadraticFit bow, double share) {
    OptionalDouble root = bow.nativeConcentration();
    OptionalDouble slope = StraightRange.slopeAtZero(bow);
    OptionalDouble upTo = StraightRange.upTo(bow, share);
    if (root.isEmpty() || slope.isEmpty() || upTo.isEmpty() || !(root.getAsDouble() > 0)) {
      return Optional.empty();
    }
    double steep = slope.getAsDouble();
    double scatter =
        bow.residualDf() > 0 ? Math.sqrt(bow.residualSumOfSquares() / bow.residualDf()) : 0;
    double least = Math.max(scatter, Resolution.of(needs.flasks()));
    double most = upTo.getAsDouble() + baseline(needs);
    return Optional.of(
        new RepeatSizing(
            needs,
            root.getAsDouble(),
            root.getAsDouble(),
            steep,
            bow.residualDf() > 0 ? OptionalDouble.of(least / steep) : OptionalDouble.empty(),
            OptionalDouble.of(
                Math.min(most, needs.series().method().trustedSignal().orElse(Double.MAX_VALUE))),
            "Sized by the bent line's result, with signals up to "
                + Flags.n(most)
                + ", where the bend has taken "
                + Flags.n(100 * share)
                + " %."));
  }

  private static double baseline(RepeatNeeds needs) {
    return needs.flasks().get(0).facts().blanks().baseline().orElse(0);
  }

  /** The same, trusting no signal above those that could be read. */
  private RepeatSizing readSoFar() {
    double read = needs.flasks().stream().mapToDouble(Flask::meanAsRead).max().orElse(0);
    return new RepeatSizing(
        needs,
        estimate,
        highest,
        slope,
        sd,
        OptionalDouble.of(Math.min(read, mostSignal.orElse(Double.MAX_VALUE))),
        basis + " No signal above the highest that could be read.");
  }

  /** The plan's input; empty where the facts do not hold the volumes. */
  Optional<RepeatAsk> ask(Limit target, RepeatCaps caps) {
    Optional<Vessel> vessel = vessel();
    OptionalDouble own = needs.series().method().targetUncertainty();
    OptionalDouble general =
        target.on() ? OptionalDouble.of(target.value()) : OptionalDouble.empty();
    Noise noise =
        sd.isPresent()
            ? new Noise(sd.getAsDouble(), 0, needs.sdDf())
            : new Noise(0, caps.noise(), 0);
    int flasks = Math.max(caps.flasks(), needs.series().method().expectedFlasks());
    return vessel.map(
        found ->
            new RepeatAsk(
                needs.series().axisUnit(),
                estimate,
                highest,
                found,
                stocks(),
                Optional.of(new Instrument(mostSignal, slope, baseline(needs))),
                noise,
                own.isPresent() ? own : general,
                caps.withFlasks(flasks)));
  }

  private Optional<Vessel> vessel() {
    AdditionSeries series = needs.series();
    FlaskFacts facts = needs.flasks().get(0).facts();
    if (series.design() == Design.STATED) {
      return Optional.of(new Stated());
    }
    OptionalDouble aliquot = volume(facts.aliquot());
    if (series.design() == Design.MADE_UP && aliquot.isPresent()) {
      return Optional.of(new MadeUp(aliquot.getAsDouble(), volume(facts.finalVolume())));
    }
    OptionalDouble start = series.design() == Design.ONE_VESSEL ? start() : OptionalDouble.empty();
    return start.isPresent()
        ? Optional.of(new OneVessel(aliquot.orElse(start.getAsDouble()), start.getAsDouble()))
        : Optional.empty();
  }

  /** The volume before the first addition, as stated, else as the volume factor knows it. */
  private OptionalDouble start() {
    for (Flask flask : needs.flasks()) {
      OptionalDouble stated = volume(flask.facts().startVolume());
      if (stated.isPresent()) {
        return stated;
      }
      if (flask.volumeFactor() > 1) {
        double added = flask.facts().addition().amount().in(MICROLITRE);
        return OptionalDouble.of(Deliveries.tidy(added / (flask.volumeFactor() - 1)));
      }
    }
    return OptionalDouble.empty();
  }

  private static OptionalDouble volume(Optional<Measured> measured) {
    return measured
        .filter(found -> found.quantity().unit().dimension() == Dimension.VOLUME)
        .map(found -> OptionalDouble.of(Deliveries.tidy(found.in(MICROLITRE))))
        .orElse(OptionalDouble.empty());
  }

  /** The stocks that the series was made with, the solvent's own analyte included. */
  private List<Stock> stocks() {
    Unit unit = needs.series().axisUnit();
    Map<String, Stock> stocks = new LinkedHashMap<>();
    for (Flask flask : needs.flasks()) {
      if (flask.facts().addition() instanceof OfStock spike && !flask.isUnspiked()) {
        double solvent = flask.facts().blanks().solvent().map(b -> b.in(unit)).orElse(0.0);
        String name = spike.stock().quantity().toString();
        stocks.putIfAbsent(name, new Stock(name, spike.stock().in(unit) + solvent));
      }
    }
    return List.copyOf(stocks.values());
  }
}
