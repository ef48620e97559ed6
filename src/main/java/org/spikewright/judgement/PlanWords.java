package org.spikewright.judgement;

import java.util.ArrayList;
import java.util.List;
import java.util.stream.Collectors;
import org.spikewright.judgement.RepeatAsk.MadeUp;
import org.spikewright.judgement.RepeatAsk.OneVessel;
import org.spikewright.judgement.RepeatAsk.Stated;
import org.spikewright.judgement.RepeatAsk.Vessel;
import org.spikewright.judgement.RepeatAsk.Weighed;
import org.spikewright.judgement.RepeatPlan.Portion;
import org.spikewright.judgement.RepeatPlan.Prepared;
import org.spikewright.judgement.RepeatPlan.StockUse;
import org.spikewright.quantity.Numbers;
import org.spikewright.quantity.Unit;

/** A plan in words for the bench. */
public final class PlanWords {
  private PlanWords() {}

  /** What is done before the first addition, a sentence each. */
  public static List<String> preparation(Prepared plan) {
    List<String> lines = new ArrayList<>();
    if (plan.sampleDilution() > 1) {
      lines.add("Dilute the sample " + fold(plan.sampleDilution()) + " first.");
    }
    plan.stock().ifPresent(stock -> lines.add(stock(stock, plan)));
    lines.add(vessel(plan.vessel()));
    return lines;
  }

  private static String stock(StockUse stock, Prepared plan) {
    String needed =
        "; "
            + amount(plan.vessel(), plan.unit(), Numbers.plain(Deliveries.tidy(stock.needed())))
            + " in all.";
    return stock.dilution() > 1
        ? "Dilute stock "
            + stock.name()
            + " "
            + fold(stock.dilution())
            + " to "
            + Numbers.plain(Deliveries.tidy(stock.concentration()))
            + " "
            + plan.unit()
            + " and add that"
            + needed
        : "Add stock " + stock.name() + needed;
  }

  private static String fold(double factor) {
    return Numbers.plain(factor) + "-fold (1 + " + Numbers.plain(factor - 1) + ")";
  }

  private static String vessel(Vessel vessel) {
    if (vessel instanceof MadeUp flask) {
      return "Each flask: "
          + microlitres(flask.aliquot())
          + " of sample and its addition"
          + (flask.finalVolume().isPresent()
              ? ", made up to " + microlitres(flask.finalVolume().getAsDouble()) + "."
              : ".");
    }
    if (vessel instanceof OneVessel one) {
      return "One vessel: "
          + microlitres(one.aliquot())
          + " of sample in a start volume of "
          + microlitres(one.start())
          + "; each addition goes on top of the last.";
    }
    return vessel instanceof Weighed weighed
        ? "Each flask: " + Numbers.rounded(weighed.aliquot() / 1000, 4) + " g of sample."
        : "Additions are concentrations, as this method states them.";
  }

  /** What is added to a flask: {@code 20 µL}, {@code no addition}. */
  public static String amount(Prepared plan, Portion portion) {
    return portion.amount() > 0
        ? amount(plan.vessel(), plan.unit(), Numbers.plain(portion.amount()))
        : "no addition";
  }

  static String amount(Vessel vessel, Unit unit, String number) {
    if (vessel instanceof Stated) {
      return number + " " + unit;
    }
    return number + (vessel instanceof Weighed ? " mg" : " µL");
  }

  /** The order of measurement: {@code 3, 1, 4, 2}. */
  public static String order(Prepared plan) {
    return plan.order().stream().map(String::valueOf).collect(Collectors.joining(", "));
  }

  /** A share with two digits: {@code 4.3 %}; what is too small to matter is said so. */
  public static String percent(double share) {
    return share < 1e-4 ? "less than 0.01 %" : Numbers.rounded(100 * share, 2) + " %";
  }

  /** A volume in the unit that a bench would use. */
  static String microlitres(double volume) {
    return volume < 1000
        ? Numbers.rounded(volume, 4).replaceAll("\\.0+$", "") + " µL"
        : Numbers.plain(Deliveries.tidy(volume / 1000)) + " mL";
  }
}
