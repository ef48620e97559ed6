package org.spikewright.reading;

import java.time.LocalDate;
import java.util.Optional;

/**
 * The named stock that an addition was made with.
 *
 * @param name as in the laboratory's table of stocks
 * @param expires the last day on which it may be used, where there is one
 */
public record Bottle(String name, Optional<LocalDate> expires) {

  /** Whether it may no longer be used on a day. */
  public boolean isExpiredOn(LocalDate day) {
    return expires.isPresent() && day.isAfter(expires.get());
  }
}
