package org.spikewright.judgement;

import static org.spikewright.judgement.Flags.n;

import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import org.spikewright.fit.NoiseFunction;
import org.spikewright.fit.Outliers;
import org.spikewright.fit.PoolEvidence;
import org.spikewright.judgement.Flag.Weight;
import org.spikewright.reading.Recorded;
import org.spikewright.reading.Signal;
import org.spikewright.series.Flask;

/** Flags on the readings of each flask among themselves. */
final class ReadingFlags {
  /** Relative spread is judged where the signal exceeds so many times the noise at zero. */
  private static final double WELL_ABOVE = 10;

  /** Grubbs' test says something from so many readings on. */
  private static final int LEAST_READINGS = 4;

  private static final double GRUBBS_ALPHA = 0.01;

  private final SeriesResult result;
  private final Optional<NoiseFunction> noise;
  private final Limit overNoise;
  private final Limit relative;

  ReadingFlags(SeriesResult result, PoolView pool, Criteria criteria) {
    this.result = result;
    this.noise =
        pool.evidence()
            .filter(evidence -> evidence.series() >= PoolEvidence.ENOUGH)
            .flatMap(PoolEvidence::readingNoise);
    this.overNoise = criteria.of(Criterion.SCATTERED_READINGS);
    this.relative = criteria.of(Criterion.SPREAD_OF_READINGS);
  }

  List<Flag> all() {
    List<Flag> flags = new ArrayList<>();
    for (Flask flask : result.flasks()) {
      if (flask.numbers() > 1) {
        scattered(flask).or(() -> apart(flask)).ifPresent(flags::add);
      }
    }
    // One flag names the worst; each flask's spread stands on the Series sheet.
    return flags.stream()
        .max((a, b) -> Double.compare(excess(a), excess(b)))
        .map(List::of)
        .orElse(List.of());
  }

  private static double excess(Flag flag) {
    return flag.number().orElse(0) / flag.limit().orElse(1);
  }

  private Optional<Flag> scattered(Flask flask) {
    double sd = flask.replicateSd();
    double signal = Math.abs(flask.meanSignal());
    double usual = noise.map(function -> function.sd(flask.meanSignal())).orElse(0.0);
    if (overNoise.on() && usual > 0 && sd > overNoise.value() * usual) {
      return Optional.of(
          Flags.against(
              FlagKind.SCATTERED_READINGS,
              Weight.REVIEW,
              sd / usual,
              overNoise,
              "The readings of flask "
                  + flask.label()
                  + " scatter "
                  + n(sd / usual)
                  + " times as much as is usual at this signal.",
              "Read this flask again; look for bubbles, memory, an unsteady signal."));
    }
    double atZero = noise.map(NoiseFunction::constant).orElse(0.0);
    boolean wellAbove = signal > WELL_ABOVE * atZero;
    if (relative.on() && wellAbove && sd > relative.value() * signal) {
      return Optional.of(
          Flags.against(
              FlagKind.SCATTERED_READINGS,
              Weight.REVIEW,
              sd / signal,
              relative,
              "The readings of flask "
                  + flask.label()
                  + " spread by "
                  + n(100 * sd / signal)
                  + " % of their mean.",
              "Read this flask again; look for bubbles, memory, an unsteady signal."));
    }
    return Optional.empty();
  }

  private Optional<Flag> apart(Flask flask) {
    if (!overNoise.on() || flask.numbers() < LEAST_READINGS) {
      return Optional.empty();
    }
    double[] values =
        flask.readings().stream()
            .map(recorded -> recorded.reading().signal())
            .filter(Signal.Value.class::isInstance)
            .mapToDouble(signal -> ((Signal.Value) signal).value())
            .toArray();
    return Outliers.grubbs(values)
        .filter(grubbs -> grubbs.p() < GRUBBS_ALPHA / result.flasks().size())
        .map(
            grubbs ->
                Flags.against(
                    FlagKind.SCATTERED_READINGS,
                    Weight.REVIEW,
                    grubbs.g(),
                    new Limit(
                        grubbs.critical(GRUBBS_ALPHA / result.flasks().size()),
                        true,
                        Flag.LimitSource.PUBLISHED,
                        "Grubbs, Technometrics 11 (1969) 1"),
                    "One reading of flask "
                        + flask.label()
                        + " ("
                        + place(flask, grubbs.index())
                        + ") lies apart from the others.",
                    "Look at this reading; it stays in the mean until a person decides."));
  }

  private static String place(Flask flask, int number) {
    List<Recorded> numbers =
        flask.readings().stream()
            .filter(recorded -> recorded.reading().signal() instanceof Signal.Value)
            .toList();
    return numbers.get(number).reading().position().within();
  }
}
