package org.spikewright.mapping;

import java.util.ArrayList;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import org.spikewright.mapping.Rejection.Reason;
import org.spikewright.quantity.Numbers;
import org.spikewright.quantity.Quantity;
import org.spikewright.reading.Accuracies.Accuracy;
import org.spikewright.reading.Tool;

/**
 * How well a dilution is known from the glassware of its steps: {@code "pipette 1 to flask 10"},
 * several parted by commas. One step may take its volume with a pipette of adjustable volume.
 *
 * <p>Systematic errors of one tool that is used several times add up with their signs, those of
 * different tools in quadrature; random errors all in quadrature (JCGM 100:2008, 5.1.2 and 5.2.2).
 */
public final class DilutionTools {
  /** Factors are written with few digits; tools agree with them within this share. */
  private static final double AGREES = 1e-6;

  private final ToolChoice choice;

  /** Reads names by a table. */
  public DilutionTools(ToolChoice choice) {
    this.choice = choice;
  }

  private record Step(Tool taken, Tool into) {
    double factor() {
      return into.highest().in(into.unit())
          * into.unit().to(taken.unit())
          / taken.highest().value();
    }
  }

  /**
   * How well a factor is known.
   *
   * @param factor volume after over volume taken, 1 or more
   * @return empty inside for a factor of 1, which no glassware made
   */
  public Understood<Optional<Accuracy>> of(String text, double factor) {
    Understood<List<Step>> steps = steps(text);
    return factor == 1
        ? steps.then(any -> new Understood.Value<>(Optional.empty()))
        : steps.then(all -> accuracy(text, all, factor));
  }

  private Understood<List<Step>> steps(String text) {
    List<Step> steps = new ArrayList<>();
    for (String each : ToolChoice.names(text)) {
      String[] pair = each.split(" to ", -1);
      if (pair.length != 2) {
        return new Understood.Nothing<>(Reason.NAME_UNKNOWN, each, Fact.DILUTION_BY.expectation());
      }
      Understood<Step> step =
          choice
              .named(pair[0])
              .then(taken -> choice.named(pair[1]).then(into -> step(taken, into)));
      if (!(step instanceof Understood.Value<Step> value)) {
        return step.then(never -> new Understood.Value<>(List.of()));
      }
      steps.add(value.value());
    }
    boolean adjustable = steps.stream().anyMatch(step -> step.taken().ranges());
    return adjustable && steps.size() > 1
        ? new Understood.Nothing<>(
            Reason.OUT_OF_BOUNDS,
            text.strip(),
            "pipettes of one volume where there are several steps")
        : new Understood.Value<>(List.copyOf(steps));
  }

  private static Understood<Step> step(Tool taken, Tool into) {
    if (into.ranges()) {
      return new Understood.Nothing<>(
          Reason.OUT_OF_BOUNDS, into.name(), "glassware of one volume to make up in");
    }
    return taken.unit().dimension() == into.unit().dimension()
        ? new Understood.Value<>(new Step(taken, into))
        : new Understood.Nothing<>(
            Reason.UNIT_DOES_NOT_FIT,
            taken.name() + " to " + into.name(),
            "two volumes, or two masses");
  }

  private static Understood<Optional<Accuracy>> accuracy(
      String text, List<Step> steps, double factor) {
    List<Use> uses = new ArrayList<>();
    if (steps.get(0).taken().ranges()) {
      Step only = steps.get(0);
      Quantity into = only.into().highest();
      uses.add(new Use(only.into(), into, 1));
      uses.add(new Use(only.taken(), new Quantity(into.value() / factor, into.unit()), -1));
    } else {
      double made = 1;
      for (Step step : steps) {
        made *= step.factor();
        uses.add(new Use(step.into(), step.into().highest(), 1));
        uses.add(new Use(step.taken(), step.taken().highest(), -1));
      }
      if (!(Math.abs(made / factor - 1) <= AGREES)) {
        return new Understood.Nothing<>(
            Reason.OUT_OF_BOUNDS,
            "a dilution of " + Numbers.plain(factor) + " by " + text.strip(),
            "glassware that gives it; this gives " + Numbers.plain(made));
      }
    }
    return new Understood.Value<>(Optional.of(combined(uses)));
  }

  private record Use(Tool tool, Quantity quantity, int sign) {}

  private static Accuracy combined(List<Use> uses) {
    Map<String, Double> systematic = new LinkedHashMap<>();
    List<String> origins = new ArrayList<>();
    double random = 0;
    for (Use use : uses) {
      Accuracy each = use.tool().accuracy(use.quantity()).orElseThrow();
      systematic.merge(use.tool().name(), use.sign() * each.systematic(), Double::sum);
      random = Math.hypot(random, each.random());
      if (!origins.contains(each.origin())) {
        origins.add(each.origin());
      }
    }
    double all = 0;
    for (double one : systematic.values()) {
      all = Math.hypot(all, one);
    }
    return new Accuracy(all, random, String.join(" | ", origins));
  }
}
