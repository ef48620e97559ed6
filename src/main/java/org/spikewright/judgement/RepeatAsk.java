package org.spikewright.judgement;

import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;
import org.spikewright.quantity.Unit;

/**
 * What a repeat plan is made from. Concentrations are in {@code unit}, referred to the solution
 * that is aliquoted.
 *
 * @param unit of every concentration here
 * @param estimate the native concentration, or a guess; above 0
 * @param highest the native concentration that the signals must leave room for; at least {@code
 *     estimate}
 * @param vessel what the additions are made in
 * @param stocks the stocks at hand; none where additions are stated
 * @param instrument what is known of its signals
 * @param noise how much flasks scatter
 * @param target relative expanded uncertainty to meet, where there is one
 * @param caps what the plan must keep to
 */
public record RepeatAsk(
    Unit unit,
    double estimate,
    double highest,
    Vessel vessel,
    List<Stock> stocks,
    Optional<Instrument> instrument,
    Noise noise,
    OptionalDouble target,
    RepeatCaps caps) {

  /** Refuses what cannot be planned from: {@link IllegalArgumentException}. */
  public RepeatAsk {
    stocks = List.copyOf(stocks);
    if (!(estimate > 0 && highest >= estimate && highest <= Double.MAX_VALUE)) {
      throw new IllegalArgumentException("native " + estimate + ", at most " + highest);
    }
    if (target.isPresent() && !(target.getAsDouble() > 0)) {
      throw new IllegalArgumentException("a target of " + target.getAsDouble());
    }
  }

  /**
   * A stock at hand.
   *
   * @param name as the bench calls it
   * @param concentration above 0
   */
  public record Stock(String name, double concentration) {
    /** Refuses an empty stock: {@link IllegalArgumentException}. */
    public Stock {
      if (!(concentration > 0 && concentration <= Double.MAX_VALUE)) {
        throw new IllegalArgumentException("a stock of " + concentration);
      }
    }
  }

  /**
   * What is known of the instrument's signals.
   *
   * @param mostSignal the largest signal, as read, that is still to be trusted: the instrument's
   *     range, or where its line begins to bend
   * @param slope signal per concentration on the axis; above 0
   * @param baseline the signal without any analyte, as read
   */
  public record Instrument(OptionalDouble mostSignal, double slope, double baseline) {
    /** Refuses a slope that is none: {@link IllegalArgumentException}. */
    public Instrument {
      if (!(slope > 0 && slope <= Double.MAX_VALUE)) {
        throw new IllegalArgumentException("a slope of " + slope);
      }
    }
  }

  /**
   * How much flasks scatter about their line: s² = floor² + (relative · concentration)².
   *
   * @param floor standard deviation at no signal, in concentration on the axis; 0 or more
   * @param relative 0 or more
   * @param borrowedDf degrees of freedom that a pool of series lends; 0 or more
   */
  public record Noise(double floor, double relative, double borrowedDf) {
    /** Refuses what is below 0 or no number: {@link IllegalArgumentException}. */
    public Noise {
      if (!(floor >= 0 && relative >= 0 && borrowedDf >= 0)) {
        throw new IllegalArgumentException(floor + ", " + relative + ", " + borrowedDf);
      }
    }

    /** Standard deviation of a flask of this concentration, on the axis. */
    double at(double concentration) {
      return Math.hypot(floor, relative * concentration);
    }
  }

  /** What the additions are made in; volumes in µL, masses in mg. */
  public sealed interface Vessel {
    /** The aliquot; 1 where additions are stated, so that amounts are concentrations. */
    double aliquot();
  }

  /**
   * Flasks made up to a mark.
   *
   * @param aliquot above 0
   * @param finalVolume at least the aliquot; empty when not known
   */
  public record MadeUp(double aliquot, OptionalDouble finalVolume) implements Vessel {
    /** Refuses a flask that does not hold its aliquot: {@link IllegalArgumentException}. */
    public MadeUp {
      if (!(aliquot > 0 && finalVolume.orElse(aliquot) >= aliquot)) {
        throw new IllegalArgumentException(aliquot + " in " + finalVolume);
      }
    }
  }

  /**
   * One vessel, to which additions are made one after the other.
   *
   * @param aliquot above 0
   * @param start the volume before the first addition; at least the aliquot
   */
  public record OneVessel(double aliquot, double start) implements Vessel {
    /** Refuses a vessel that does not hold its aliquot: {@link IllegalArgumentException}. */
    public OneVessel {
      if (!(aliquot > 0 && start >= aliquot * (1 - 1e-9))) {
        throw new IllegalArgumentException(aliquot + " in " + start);
      }
    }
  }

  /**
   * Flasks in which everything is weighed.
   *
   * @param aliquot in mg, above 0
   */
  public record Weighed(double aliquot) implements Vessel {
    /** Refuses an aliquot that is none: {@link IllegalArgumentException}. */
    public Weighed {
      if (!(aliquot > 0)) {
        throw new IllegalArgumentException("an aliquot of " + aliquot);
      }
    }
  }

  /** Additions that the bench states as concentrations: amounts are these. */
  public record Stated() implements Vessel {
    @Override
    public double aliquot() {
      return 1;
    }
  }
}
