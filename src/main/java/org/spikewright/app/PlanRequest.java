package org.spikewright.app;

import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;
import org.spikewright.judgement.Pipette;
import org.spikewright.judgement.RepeatAsk;
import org.spikewright.judgement.RepeatAsk.Instrument;
import org.spikewright.judgement.RepeatAsk.MadeUp;
import org.spikewright.judgement.RepeatAsk.Noise;
import org.spikewright.judgement.RepeatAsk.OneVessel;
import org.spikewright.judgement.RepeatAsk.Stated;
import org.spikewright.judgement.RepeatAsk.Stock;
import org.spikewright.judgement.RepeatAsk.Vessel;
import org.spikewright.judgement.RepeatAsk.Weighed;
import org.spikewright.judgement.RepeatCaps;
import org.spikewright.quantity.Dimension;
import org.spikewright.quantity.Quantity;
import org.spikewright.quantity.QuantityText;
import org.spikewright.quantity.Unit;

/** The options of {@code plan}, understood; or every fault in them. */
final class PlanRequest {
  private static final Unit MICROLITRE = Unit.of("µL");
  private static final Unit MILLIGRAM = Unit.of("mg");
  private static final List<Dimension> CONCENTRATIONS =
      List.of(
          Dimension.MASS_PER_VOLUME,
          Dimension.MASS_PER_MASS,
          Dimension.AMOUNT_PER_VOLUME,
          Dimension.AMOUNT_PER_MASS);

  private final PlanOptions options;
  private final List<String> faults = new ArrayList<>();
  private final Optional<RepeatAsk> ask;

  PlanRequest(PlanOptions options, RepeatCaps caps) {
    this.options = options;
    this.ask = ask(caps);
  }

  /** What the planner is asked; empty when there are faults. */
  Optional<RepeatAsk> ask() {
    return ask;
  }

  List<String> faults() {
    return faults;
  }

  private Optional<RepeatAsk> ask(RepeatCaps caps) {
    Optional<Quantity> expected =
        QuantityText.parse(options.expected)
            .filter(q -> q.value() > 0 && CONCENTRATIONS.contains(q.unit().dimension()));
    if (expected.isEmpty()) {
      fault("--expected", options.expected, "a concentration above 0, such as \"12 µg/L\"");
    }
    Optional<Vessel> vessel = vessel();
    List<Stock> stocks = expected.map(quantity -> stocks(quantity.unit())).orElse(List.of());
    OptionalDouble noise = share("--noise", options.noise, "2 %");
    OptionalDouble target = share("--target", options.target, "10 %");
    RepeatCaps kept = caps(caps);
    Optional<Instrument> instrument = vessel.flatMap(this::instrument);
    if (!faults.isEmpty()) {
      return Optional.empty();
    }
    double native0 = expected.orElseThrow().value();
    return Optional.of(
        new RepeatAsk(
            expected.get().unit(),
            native0,
            native0,
            vessel.orElseThrow(),
            stocks,
            instrument,
            new Noise(0, noise.orElse(kept.noise()), 0),
            target,
            kept));
  }

  private Optional<Vessel> vessel() {
    if (options.aliquot.isEmpty()) {
      boolean stated =
          options.stocks.isEmpty() && options.finalVolume.isEmpty() && options.start.isEmpty();
      if (!stated) {
        faults.add("no --aliquot; expected an amount such as \"10 mL\"");
      }
      return stated ? Optional.of(new Stated()) : Optional.empty();
    }
    Optional<Quantity> mass = QuantityText.parse(options.aliquot.get(), Dimension.MASS);
    if (mass.isPresent() && mass.get().value() > 0 && options.start.isEmpty()) {
      return Optional.of(new Weighed(mass.get().in(MILLIGRAM)));
    }
    OptionalDouble aliquot = volume("--aliquot", options.aliquot);
    OptionalDouble start = volume("--start", options.start);
    OptionalDouble full = volume("--final", options.finalVolume);
    if (start.isPresent() && full.isPresent()) {
      faults.add("--start and --final; expected one: --start is for one vessel");
    }
    if (!faults.isEmpty() || aliquot.isEmpty()) {
      return Optional.empty();
    }
    double taken = aliquot.getAsDouble();
    if (start.orElse(full.orElse(taken)) < taken) {
      faults.add("an aliquot that does not fit; expected --final or --start at least as large");
      return Optional.empty();
    }
    return Optional.of(
        start.isPresent() ? new OneVessel(taken, start.getAsDouble()) : new MadeUp(taken, full));
  }

  private OptionalDouble volume(String option, Optional<String> text) {
    if (text.isEmpty()) {
      return OptionalDouble.empty();
    }
    Optional<Quantity> volume =
        QuantityText.parse(text.get(), Dimension.VOLUME).filter(found -> found.value() > 0);
    if (volume.isEmpty()) {
      fault(option, text.get(), "a volume above 0, such as \"10 mL\"");
      return OptionalDouble.empty();
    }
    return OptionalDouble.of(volume.get().in(MICROLITRE));
  }

  private List<Stock> stocks(Unit unit) {
    List<Stock> stocks = new ArrayList<>();
    for (String text : options.stocks) {
      int equals = text.indexOf('=');
      Optional<Quantity> concentration =
          QuantityText.parse(text.substring(equals + 1), unit.dimension())
              .filter(found -> found.value() > 0);
      if (concentration.isPresent()) {
        String name = text.replace("=", " (") + (equals < 0 ? "" : ")");
        stocks.add(new Stock(name, concentration.get().in(unit)));
      } else {
        fault("--stock", text, unit.dimension().words() + ", as --expected is");
      }
    }
    return stocks;
  }

  private OptionalDouble share(String option, Optional<String> text, String example) {
    if (text.isEmpty()) {
      return OptionalDouble.empty();
    }
    Optional<Quantity> share =
        QuantityText.parse(text.get(), Dimension.NUMBER)
            .filter(found -> found.in(Unit.ONE) > 0 && found.in(Unit.ONE) < 1);
    if (share.isEmpty()) {
      fault(option, text.get(), "a share between 0 and 100 %, such as \"" + example + "\"");
      return OptionalDouble.empty();
    }
    return OptionalDouble.of(share.get().in(Unit.ONE));
  }

  private RepeatCaps caps(RepeatCaps caps) {
    List<Pipette> pipettes = new ArrayList<>();
    for (String text : options.pipettes) {
      Optional<Pipette> pipette = Pipette.parse(text);
      if (pipette.isEmpty()) {
        fault("--pipette", text, Pipette.EXPECTED);
      }
      pipette.ifPresent(pipettes::add);
    }
    int flasks = options.flasks.orElse(caps.flasks());
    if (!(flasks >= RepeatCaps.FEWEST_FLASKS && flasks <= 100)) {
      fault("--flasks", String.valueOf(flasks), "4 to 100, so that a bend can be seen");
      return caps;
    }
    RepeatCaps counted = caps.withFlasks(flasks);
    return pipettes.isEmpty() ? counted : counted.withPipettes(pipettes);
  }

  /** The slope on the axis: the flask holds the aliquot diluted. */
  private Optional<Instrument> instrument(Vessel vessel) {
    if (options.slope.isEmpty()) {
      if (options.mostSignal.isPresent()) {
        faults.add("--most-signal without --slope; expected both");
      }
      return Optional.empty();
    }
    double slope = options.slope.get() / dilution(vessel);
    double most = options.mostSignal.orElse(Double.MAX_VALUE);
    if (!(slope > 0 && slope <= Double.MAX_VALUE && most > 0 && most <= Double.MAX_VALUE)) {
      faults.add("--slope or --most-signal not above 0; expected numbers above 0");
      return Optional.empty();
    }
    OptionalDouble trusted =
        options.mostSignal.isPresent() ? OptionalDouble.of(most) : OptionalDouble.empty();
    return Optional.of(new Instrument(trusted, slope, 0));
  }

  private static double dilution(Vessel vessel) {
    if (vessel instanceof MadeUp flask) {
      return flask.finalVolume().orElse(flask.aliquot()) / flask.aliquot();
    }
    return vessel instanceof OneVessel one ? one.start() / one.aliquot() : 1;
  }

  private void fault(String option, String found, String expected) {
    faults.add(option + " \"" + found + "\"; expected " + expected);
  }
}
