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
 * @param electrode the numbers of an electrode's series, which has no {@code result}
 */
public record Outcome(
    Gathered gathered,
    Optional<SeriesResult> result,
    List<Flag> flags,
    Verdict verdict,
    String reported,
    Optional<Instant> waitingUntil,
    Optional<ElectrodeResult> electrode) {

  /** The same with an electrode's numbers, reported where the verdict lets any be. */
  Outcome with(ElectrodeResult numbers) {
    boolean reportable = verdict == Verdict.REPORT || verdict == Verdict.REVIEW;
    return new Outcome(
        gathered,
        result,
        flags,
        verdict,
        reportable ? numbers.reported() : "",
        waitingUntil,
        Optional.of(numbers));
  }
}
