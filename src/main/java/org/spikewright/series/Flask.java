package org.spikewright.series;

import java.math.BigDecimal;
import java.math.MathContext;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import java.util.OptionalDouble;
import org.spikewright.quantity.Quantity;
import org.spikewright.reading.FlaskFacts;
import org.spikewright.reading.InternalStandard;
import org.spikewright.reading.Recorded;
import org.spikewright.reading.Signal;
import org.spikewright.reading.Spread;

/**
 * One flask of a series (in one vessel: its state after an addition), as the line sees it.
 *
 * @param label the flask's label, or its addition where none is mapped
 * @param facts what is known about it
 * @param x the addition referred to the aliquot, in the series' axis unit
 * @param volumeFactor the factor by which a signal is multiplied to allow for the flask's volume
 * @param readings the readings that count, ordered by replicate and time
 * @param secondRun readings of a second run of this flask, never averaged with the first
 * @param meanSignal mean of the readings that are numbers, after the baseline and divided by the
 *     internal standard where there is one, before the volume factor; NaN when no reading is a
 *     number
 * @param replicateSd standard deviation of those readings; NaN with fewer than two
 * @param numbers how many readings are numbers, those behind a mean counted each
 */
public record Flask(
    String label,
    FlaskFacts facts,
    double x,
    double volumeFactor,
    List<Recorded> readings,
    List<Recorded> secondRun,
    double meanSignal,
    double replicateSd,
    int numbers) {

  /** Beyond these, units that were converted may leave their trace. */
  private static final MathContext LEVEL_DIGITS = new MathContext(9);

  /** A reading by itself does not scatter. */
  private static final Spread SINGLE = new Spread(0, 1);

  /** A flask with the mean of its readings. */
  static Flask of(FlaskDraft draft, double x, double volumeFactor) {
    double[] signals = new double[draft.readings().size()];
    List<Spread> spreads = new ArrayList<>();
    int numbers = 0;
    boolean means = false;
    for (Recorded recorded : draft.readings()) {
      if (recorded.reading().signal() instanceof Signal.Value signal) {
        signals[numbers++] = beforeTheLine(signal, draft.facts());
        spreads.add(signal.spread().orElse(SINGLE));
        means |= signal.spread().isPresent();
      }
    }
    signals = Arrays.copyOf(signals, numbers);
    if (means) {
      Together together = Together.of(signals, spreads);
      return new Flask(
          draft.label(),
          draft.facts(),
          x,
          volumeFactor,
          draft.readings(),
          draft.secondRun(),
          together.mean(),
          together.sd(),
          together.readings());
    }
    double mean = mean(signals);
    return new Flask(
        draft.label(),
        draft.facts(),
        x,
        volumeFactor,
        draft.readings(),
        draft.secondRun(),
        mean,
        standardDeviation(signals, mean),
        numbers);
  }

  /** The readings behind means of several: what all of them together would have given. */
  private record Together(double mean, double sd, int readings) {
    static Together of(double[] means, List<Spread> spreads) {
      int readings = 0;
      double sum = 0;
      for (int i = 0; i < means.length; i++) {
        readings += spreads.get(i).readings();
        sum += spreads.get(i).readings() * means[i];
      }
      double mean = means.length == 1 ? means[0] : sum / readings;
      double squares = 0;
      for (int i = 0; i < means.length; i++) {
        Spread own = spreads.get(i);
        squares += (own.readings() - 1) * own.sd() * own.sd();
        squares += own.readings() * (means[i] - mean) * (means[i] - mean);
      }
      double sd = means.length == 1 ? spreads.get(0).sd() : Math.sqrt(squares / (readings - 1));
      return new Together(mean, sd, readings);
    }
  }

  /** The baseline first, then the internal standard, whose own baseline comes off it. */
  private static double beforeTheLine(Signal.Value signal, FlaskFacts facts) {
    double net = signal.value() - facts.blanks().baseline().orElse(0);
    if (signal.standard().isEmpty()) {
      return net;
    }
    OptionalDouble baseline =
        facts.internalStandard().map(InternalStandard::baseline).orElse(OptionalDouble.empty());
    return net / (signal.standard().getAsDouble() - baseline.orElse(0));
  }

  private static double mean(double[] values) {
    double sum = 0;
    for (double value : values) {
      sum += value;
    }
    return sum / values.length;
  }

  private static double standardDeviation(double[] values, double mean) {
    double squares = 0;
    for (double value : values) {
      squares += (value - mean) * (value - mean);
    }
    return values.length < 2 ? Double.NaN : Math.sqrt(squares / (values.length - 1));
  }

  /** The same flask by its second run alone; without a second run it has no readings. */
  public Flask second() {
    FlaskDraft draft = new FlaskDraft(label + ", second run", facts, secondRun, List.of());
    return of(draft, x, volumeFactor);
  }

  /** Whether the flask takes part in the fit. */
  public boolean isUsable() {
    return numbers > 0;
  }

  /** Mean of the readings as the instrument showed them, the baseline included. */
  public double meanAsRead() {
    if (facts.internalStandard().isEmpty()) {
      return meanSignal + facts.blanks().baseline().orElse(0);
    }
    double sum = 0;
    for (Recorded recorded : readings) {
      sum += recorded.reading().signal() instanceof Signal.Value signal ? signal.value() : 0;
    }
    return sum / numbers;
  }

  /** The signal that the line is fitted to. */
  public double y() {
    return meanSignal * volumeFactor;
  }

  /**
   * The amount delivered, which tells one addition level from another whatever unit it was written
   * in: in base units (L, g, or those of a stated concentration), to 9 significant digits. In one
   * vessel it is the total so far.
   */
  public double delivered() {
    Quantity amount = facts.addition().amount();
    return new BigDecimal(amount.value() * amount.unit().perBase())
        .round(LEVEL_DIGITS)
        .doubleValue();
  }

  /** Whether nothing was added to it. */
  public boolean isUnspiked() {
    return facts.addition().isNone();
  }
}
