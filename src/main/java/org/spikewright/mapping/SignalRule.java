package org.spikewright.mapping;

import java.util.Optional;
import org.spikewright.quantity.Unit;
import org.spikewright.reading.InternalStandard;
import org.spikewright.reading.MethodFacts.Electrode;

/**
 * What a mapping says about its signals.
 *
 * @param unit of signals that are quantities: a concentration read back, or a potential; empty for
 *     all others
 * @param standard how the internal standard was given, where there is one
 * @param electrode what a potentiometric method says
 */
public record SignalRule(
    Optional<Unit> unit, Optional<InternalStandard.Given> standard, Optional<Electrode> electrode) {

  /** A plain signal. */
  public static final SignalRule PLAIN =
      new SignalRule(Optional.empty(), Optional.empty(), Optional.empty());
}
