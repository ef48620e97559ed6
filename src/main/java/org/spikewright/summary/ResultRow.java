package org.spikewright.summary;

import java.util.List;
import java.util.OptionalDouble;
import java.util.OptionalInt;
import org.spikewright.judgement.Verdict;
import org.spikewright.series.SeriesKey;

/**
 * One result, as the results file, the Results sheet and the ledger hold it.
 *
 * @param key the identity of its series
 * @param batch the batch to show
 * @param role what it was measured for, in a word
 * @param value the result, in {@code unit}
 * @param unit the unit of the result; empty when there is no series
 * @param reported the text to report; empty when nothing can be reported
 * @param standardUncertainty combined; empty until a budget exists
 * @param expandedUncertainty likewise
 * @param coverageFactor likewise
 * @param lower95 lower end of the reported fit interval, in {@code unit}; empty when unbounded
 * @param upper95 upper end likewise
 * @param ownStandardError of the fit alone with this series' own residuals, in {@code unit}
 * @param ownLower95 lower end of that interval
 * @param ownUpper95 upper end of that interval
 * @param intervalBasis {@code own} or {@code pool}; empty without an interval
 * @param detectionLimit in {@code unit}
 * @param verdict what is to happen
 * @param flags short names, notes included
 * @param sentences one for each flag, in the same order
 * @param flasks how many the line was fitted to
 * @param readings how many count
 * @param slope signal per axis unit
 * @param signalIntercept signal
 * @param residualSd signal
 * @param residualDf degrees of freedom
 * @param r correlation coefficient
 * @param design in a word
 * @param sourceFiles the files its readings came from, sorted
 */
public record ResultRow(
    SeriesKey key,
    String batch,
    String role,
    OptionalDouble value,
    String unit,
    String reported,
    OptionalDouble standardUncertainty,
    OptionalDouble expandedUncertainty,
    OptionalDouble coverageFactor,
    OptionalDouble lower95,
    OptionalDouble upper95,
    OptionalDouble ownStandardError,
    OptionalDouble ownLower95,
    OptionalDouble ownUpper95,
    String intervalBasis,
    OptionalDouble detectionLimit,
    Verdict verdict,
    List<String> flags,
    List<String> sentences,
    int flasks,
    int readings,
    OptionalDouble slope,
    OptionalDouble signalIntercept,
    OptionalDouble residualSd,
    OptionalInt residualDf,
    OptionalDouble r,
    String design,
    List<String> sourceFiles) {}
