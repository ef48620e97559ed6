package org.spikewright.judgement;

import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;
import org.spikewright.fit.Forecast;
import org.spikewright.quantity.Unit;

/** What to prepare so that a series can be reported, or why nothing can be planned. */
public sealed interface RepeatPlan {

  /**
   * A plan that keeps to every cap. Its volumes are arithmetic, not a procedure.
   *
   * @param unit of every concentration
   * @param vessel what the additions are made in
   * @param sampleDilution how often the sample is diluted before the aliquot, on top of what was
   *     done before; 1 when it is not
   * @param stock which stock; empty where additions are stated
   * @param nativeConcentration expected in the solution that is aliquoted, after the dilution
   * @param portions flasks by rising addition; in one vessel its steps
   * @param order numbers of the flasks in the order of measurement
   * @param replicates readings of each flask
   * @param topOverNative top addition over the expected native concentration
   * @param forecast what the line would tell
   * @param driftEffect relative change of the result by a drift of 1 % from the first flask
   *     measured to the last, 0 or more
   * @param remarks sentences that the bench should read
   */
  record Prepared(
      Unit unit,
      RepeatAsk.Vessel vessel,
      double sampleDilution,
      Optional<StockUse> stock,
      double nativeConcentration,
      List<Portion> portions,
      List<Integer> order,
      int replicates,
      double topOverNative,
      Forecast forecast,
      double driftEffect,
      List<String> remarks)
      implements RepeatPlan {

    /** Takes copies. */
    public Prepared {
      portions = List.copyOf(portions);
      order = List.copyOf(order);
      remarks = List.copyOf(remarks);
    }

    /** The same with one more remark. */
    Prepared with(String remark) {
      List<String> all = new ArrayList<>(remarks);
      all.add(remark);
      return measured(order, driftEffect, all);
    }

    /** The same, measured in an order. */
    Prepared measured(List<Integer> inOrder, double effect, List<String> said) {
      return new Prepared(
          unit,
          vessel,
          sampleDilution,
          stock,
          nativeConcentration,
          portions,
          inOrder,
          replicates,
          topOverNative,
          forecast,
          effect,
          said);
    }
  }

  /**
   * A stock as it is used.
   *
   * @param name of the stock
   * @param dilution how often it is diluted first; 1 when it is not
   * @param concentration as added, after the dilution
   * @param needed how much of it all flasks take, in µL or mg
   */
  record StockUse(String name, double dilution, double concentration, double needed) {}

  /**
   * One flask, or one step in a vessel.
   *
   * @param number from 1, by rising addition
   * @param amount added: µL, mg, or the concentration where it is stated; in one vessel at this
   *     step
   * @param x the addition on the axis; in one vessel of all steps so far
   * @param pipette what delivers it; empty without an addition and where additions are stated
   * @param signal expected, as read; empty when the slope is not known
   */
  record Portion(int number, double amount, double x, String pipette, OptionalDouble signal) {}

  /**
   * No plan.
   *
   * @param cap what stops it, in a word or two
   * @param found a sentence with the numbers
   * @param help what would help
   */
  record Refused(String cap, String found, String help) implements RepeatPlan {}
}
