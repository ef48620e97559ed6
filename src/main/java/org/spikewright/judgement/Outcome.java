package org.spikewright.judgement;

import java.time.Instant;
import java.util.List;
import java.util.Optional;
import org.spikewright.series.Gathered;

/**
 * What the night says about one series.
 *
 * @param gathered the series, or why there is none
 * @param result the numbers, where the flasks allow any
 * @param flags in the order of {@link FlagKind}
 * @param verdict what is to happen
 * @param reported the text to report; empty when nothing can be reported
 * @param waitingUntil up to when further flasks are waited for; empty when they are not
 */
public record Outcome(
    Gathered gathered,
    Optional<SeriesResult> result,
    List<Flag> flags,
    Verdict verdict,
    String reported,
    Optional<Instant> waitingUntil) {}
