package org.spikewright.mapping;

import java.util.Optional;
import org.spikewright.quantity.Unit;

/**
 * How the text in a cell or a label is written.
 *
 * @param unit of bare numbers
 * @param time of dates and times
 */
public record Form(Optional<Unit> unit, Optional<TimeForm> time) {
  /** Nothing is said: text as it stands, or a quantity with its own unit. */
  public static final Form PLAIN = new Form(Optional.empty(), Optional.empty());
}
