package org.spikewright.series;

import java.util.ArrayList;
import java.util.HashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import org.spikewright.reading.BatchReading;
import org.spikewright.reading.CheckReading;
import org.spikewright.reading.FlaskFacts;
import org.spikewright.reading.Reading;
import org.spikewright.reading.Recorded;
import org.spikewright.reading.Signal;
import org.spikewright.reading.Spread;
import org.spikewright.reading.Subject;

/**
 * Corrects readings for drift before they are gathered, where their method asks for it. Never where
 * an internal standard was read, which drifts with the analyte.
 */
public final class Drifts {
  /** A batch that delimits is by itself; all others of an instrument's lab day are one run. */
  private record Run(String instrument, String analyte, String line, String batch) {
    static Run of(Subject subject, String batch) {
      return new Run(subject.instrument(), subject.analyte(), subject.line(), batch);
    }
  }

  private final Map<Run, DriftCorrection> corrections = new HashMap<>();

  /** By the drift checks among readings beside the samples. */
  public Drifts(List<BatchReading> besideSamples) {
    Map<Run, List<CheckReading>> runs = new HashMap<>();
    for (BatchReading reading : besideSamples) {
      if (reading instanceof CheckReading check) {
        String batch = check.batch().delimits() ? check.batch().name() : "";
        runs.computeIfAbsent(Run.of(check.subject(), batch), key -> new ArrayList<>()).add(check);
      }
    }
    runs.forEach((run, checks) -> corrections.put(run, DriftCorrection.of(checks)));
  }

  /** The readings with corrected signals; their text stays what the instrument showed. */
  public List<Recorded> corrected(List<Recorded> readings) {
    boolean asked =
        !corrections.isEmpty()
            && readings.stream().anyMatch(recorded -> isAsked(recorded.reading().facts()));
    return asked ? readings.stream().map(this::corrected).toList() : readings;
  }

  private static boolean isAsked(FlaskFacts facts) {
    return facts.method().calculation().correctDrift() && facts.internalStandard().isEmpty();
  }

  private Recorded corrected(Recorded recorded) {
    Reading reading = recorded.reading();
    if (!isAsked(reading.facts())
        || reading.measuredAt().isEmpty()
        || !(reading.signal() instanceof Signal.Value signal)) {
      return recorded;
    }
    double baseline = reading.facts().blanks().baseline().orElse(0);
    double factor = correction(reading).factorAt(reading.measuredAt().get());
    double corrected = baseline + (signal.value() - baseline) * factor;
    Optional<Spread> spread =
        signal.spread().map(read -> new Spread(read.sd() * Math.abs(factor), read.readings()));
    return new Recorded(
        with(reading, new Signal.Value(corrected, signal.text(), signal.standard(), spread)),
        recorded.arrival(),
        recorded.firstArrivedAt(),
        recorded.superseded());
  }

  private DriftCorrection correction(Reading reading) {
    String batch = reading.batch().delimits() ? reading.batch().name() : "";
    return Optional.ofNullable(corrections.get(Run.of(reading.subject(), batch)))
        .or(() -> Optional.ofNullable(corrections.get(Run.of(reading.subject(), ""))))
        .orElse(DriftCorrection.NONE);
  }

  private static Reading with(Reading reading, Signal signal) {
    return new Reading(
        reading.subject(),
        reading.batch(),
        reading.flask(),
        reading.flaskMapped(),
        reading.replicate(),
        reading.replicateMapped(),
        reading.measuredAt(),
        signal,
        reading.facts(),
        reading.position());
  }
}
