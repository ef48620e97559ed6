package org.spikewright.judgement;

import java.util.Comparator;
import java.util.List;
import java.util.Optional;
import org.spikewright.judgement.Deliveries.Wanted;
import org.spikewright.judgement.RepeatAsk.OneVessel;
import org.spikewright.judgement.RepeatAsk.Stock;
import org.spikewright.judgement.RepeatPlan.Refused;
import org.spikewright.quantity.Numbers;

/** Says which cap keeps the additions from being delivered, and what would help. */
final class DeliveryRefusal {
  private final RepeatAsk ask;
  private final double room;

  DeliveryRefusal(RepeatAsk ask, double room) {
    this.ask = ask;
    this.room = room;
  }

  Refused of(Wanted wanted) {
    Comparator<Stock> byStrength = Comparator.comparingDouble(Stock::concentration);
    Optional<Stock> strongest = ask.stocks().stream().max(byStrength);
    Optional<Stock> weakest = ask.stocks().stream().min(byStrength);
    if (strongest.isEmpty()) {
      return new Refused(
          "stock", "No stock is named.", "Name a stock with its concentration, or several.");
    }
    if (ask.caps().pipettes().isEmpty()) {
      return new Refused(
          "pipettes", "No pipette is named.", "Name the pipettes with their ranges.");
    }
    double needed = wanted.leastTop() * wanted.nativeConcentration() * ask.vessel().aliquot();
    double volume = needed / strongest.get().concentration();
    double reach = Deliveries.reach(ask, wanted.steps()).orElse(0);
    if (volume > room) {
      return tooMuch(strongest.get(), needed);
    }
    return volume > reach
        ? tooLarge(strongest.get(), volume, reach)
        : tooSmall(weakest.get(), wanted, reach);
  }

  private Refused tooLarge(Stock strongest, double volume, double reach) {
    double needed = volume * strongest.concentration();
    return new Refused(
        "pipettes",
        "The top addition of stock "
            + strongest.name()
            + " would be "
            + amount(volume)
            + ", more than the pipettes deliver ("
            + amount(reach)
            + ").",
        "A larger pipette, or a stock of at least " + concentration(needed / reach) + ".");
  }

  private Refused tooSmall(Stock weakest, Wanted wanted, double reach) {
    double most = wanted.mostTop() * wanted.nativeConcentration() * ask.vessel().aliquot();
    List<Double> dilutions = Planner.ladder(ask.caps().largestStockDilution());
    double dilution = dilutions.get(dilutions.size() - 1);
    double smallest = most / (weakest.concentration() / dilution) / wanted.steps();
    double lowest = ask.caps().lowestVolume().orElse(0);
    if (!(smallest < lowest)) {
      return new Refused(
          "pipettes",
          "No evenly spaced volumes between "
              + amount(lowest)
              + " and "
              + amount(reach)
              + " can be set on the pipettes named.",
          "Pipettes whose ranges meet, with finer increments, or another stock.");
    }
    return new Refused(
        "largest dilution of a stock",
        "The first addition of stock "
            + weakest.name()
            + ", diluted as far as allowed ("
            + Numbers.plain(dilution)
            + "-fold), would be "
            + amount(smallest)
            + ", less than the pipettes deliver ("
            + amount(lowest)
            + ").",
        "A stock of at most "
            + concentration(most / lowest / wanted.steps() * dilution)
            + ", or a pipette for smaller volumes.");
  }

  private Refused tooMuch(Stock strongest, double needed) {
    boolean one = ask.vessel() instanceof OneVessel;
    String place =
        one
            ? "the "
                + Numbers.rounded(100 * ask.caps().largestShare(), 2)
                + " % of the vessel's "
                + amount(((OneVessel) ask.vessel()).start())
                + " that may be added"
            : "the flask holds beside the aliquot";
    String helps =
        room > 0 ? "A stock of at least " + concentration(needed / room) + ", or a " : "A ";
    return new Refused(
        one ? "largest share of the volume" : "volume of the flask",
        "The strongest stock ("
            + strongest.name()
            + ") would need "
            + amount(needed / strongest.concentration())
            + ", more than "
            + place
            + " ("
            + amount(room)
            + ").",
        helps + (one ? "smaller aliquot." : "smaller aliquot or a larger flask."));
  }

  private String amount(double amount) {
    return PlanWords.amount(ask.vessel(), ask.unit(), Numbers.rounded(amount, 3));
  }

  private String concentration(double value) {
    return Numbers.rounded(value, 2) + " " + ask.unit();
  }
}
