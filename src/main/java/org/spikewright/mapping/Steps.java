package org.spikewright.mapping;

import java.math.BigDecimal;
import java.util.ArrayList;
import java.util.HashMap;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import org.spikewright.mapping.Rejection.Reason;
import org.spikewright.quantity.Quantity;
import org.spikewright.quantity.Unit;
import org.spikewright.reading.Addition;
import org.spikewright.reading.Addition.OfStock;
import org.spikewright.reading.Subject;
import org.spikewright.table.Position;

/**
 * Sums up the additions to each vessel of a file, in file order.
 *
 * <p>A new flask label begins a new step and its volume is added to the total; a label seen before
 * is another reading of that step (a replicate, or a second run) and adds nothing, but must name
 * the same volume and stock. After a row whose addition, label or sample could not be read, no new
 * step of the vessels begun by then is used, since their totals are not known.
 */
final class Steps {
  /** Whose vessel: one sample and analyte in one batch and preparation. */
  record Vessel(Subject subject, String batch, String preparation) {}

  private record Step(OfStock own, Addition total) {}

  private static final class State {
    final Map<String, Step> steps = new LinkedHashMap<>();
    Optional<Step> last = Optional.empty();
    Optional<Position> lost = Optional.empty();
  }

  private final Map<Vessel, State> vessels = new HashMap<>();

  /**
   * What was added to a vessel so far.
   *
   * @param flask the step's label
   * @param own what this step added, as its row says
   */
  Understood<Addition> total(Vessel vessel, String flask, OfStock own) {
    State state = vessels.computeIfAbsent(vessel, key -> new State());
    Step known = state.steps.get(flask);
    if (known != null) {
      return known.own().equals(own)
          ? new Understood.Value<>(known.total())
          : new Understood.Nothing<>(
              Reason.CONTRADICTION,
              words(own, known.own()),
              words(known.own(), own)
                  + ", as an earlier row says of step '"
                  + Said.briefly(flask)
                  + "'");
    }
    if (state.lost.isPresent()) {
      return new Understood.Nothing<>(
          Reason.FACT_MISSING,
          own.delivered().toString(),
          "a known total; what was added in " + state.lost.get().within() + " could not be read");
    }
    Addition total = state.last.map(step -> sum(step.total(), own)).orElse(own);
    Step step = new Step(own, total);
    state.steps.put(flask, step);
    state.last = Optional.of(step);
    return new Understood.Value<>(total);
  }

  /** The volume, or the stock too where only that tells one addition from the other. */
  private static String words(OfStock step, OfStock other) {
    String volume = step.delivered().toString();
    return step.delivered().equals(other.delivered()) ? volume + " of " + step.stock() : volume;
  }

  /** A row's addition could not be read. */
  void lose(Position position) {
    for (State state : vessels.values()) {
      if (state.lost.isEmpty()) {
        state.lost = Optional.of(position);
      }
    }
  }

  /** One portion for each stretch of steps with the same stock; a step of nothing brings none. */
  private static Addition sum(Addition total, OfStock own) {
    if (total.isNone()) {
      return own;
    }
    List<OfStock> portions = new ArrayList<>(total.portions());
    OfStock last = portions.get(portions.size() - 1);
    if (own.isNone() || own.stock().equals(last.stock())) {
      portions.set(
          portions.size() - 1, new OfStock(sum(last.delivered(), own.delivered()), last.stock()));
    } else {
      portions.add(own);
    }
    return portions.size() == 1 ? portions.get(0) : new Addition.OfStocks(portions);
  }

  /** In decimals, so that three steps of 0.1 mL are 0.3 mL. */
  private static Quantity sum(Quantity total, Quantity own) {
    Unit unit = total.unit();
    return new Quantity(
        BigDecimal.valueOf(total.value()).add(BigDecimal.valueOf(own.in(unit))).doubleValue(),
        unit);
  }
}
