package org.spikewright.analysis;

import java.util.Optional;

/**
 * What is known of a lab day before its series are looked at.
 *
 * @param memory of earlier lab days
 * @param stored what the day's pools came to when it was first summarised after its close; empty
 *     before
 * @param inProgress whether the day has not closed, so that its pools are provisional
 */
public record Recall(Memory memory, Optional<NightEvidence> stored, boolean inProgress) {

  /** A closed day without any past. */
  public static final Recall NOTHING = new Recall(Memory.NONE, Optional.empty(), false);
}
