package org.spikewright.summary;

import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.OptionalInt;
import java.util.SortedSet;
import java.util.TreeSet;
import java.util.function.Function;
import org.spikewright.fit.Budget;
import org.spikewright.fit.StraightLine;
import org.spikewright.judgement.ElectrodeResult;
import org.spikewright.judgement.Flag;
import org.spikewright.judgement.Outcome;
import org.spikewright.judgement.SeriesResult;
import org.spikewright.judgement.Verdict;
import org.spikewright.reading.FlaskFacts;
import org.spikewright.reading.Recorded;
import org.spikewright.series.AdditionSeries;
import org.spikewright.series.Flask;
import org.spikewright.series.Gathered;
import org.spikewright.series.SeriesKey;
import org.spikewright.series.Ungrouped;

/**
 * One result, as the results file, the Results sheet and the ledger hold it.
 *
 * @param key the identity of its series
 * @param batch the batch to show
 * @param role what it was measured for, in a word
 * @param value the result, in {@code unit}
 * @param unit the unit of the result; empty when there is no series
 * @param reported the text to report; empty when nothing can be reported
 * @param standardUncertainty combined, of an electrode that of the fit alone; empty where the fit
 *     has no uncertainty
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
 * @param slope signal per axis unit; of an electrode signal per decade
 * @param signalIntercept signal
 * @param residualSd signal
 * @param residualDf degrees of freedom
 * @param r correlation coefficient
 * @param design in a word
 * @param sourceFiles the files its readings came from, sorted
 * @param evidence what it rests on beside its own line
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
    List<String> sourceFiles,
    RowEvidence evidence) {

  /** The row of what the night says about a series. */
  public static ResultRow of(Outcome outcome) {
    Optional<SeriesResult> result = outcome.result();
    Optional<StraightLine> line = result.map(SeriesResult::line);
    Optional<ElectrodeResult> electrode = outcome.electrode();
    Optional<Budget> budget = result.flatMap(SeriesResult::budget);
    Origin origin = Origin.of(outcome.gathered());
    return new ResultRow(
        outcome.gathered().key(),
        origin.batch,
        origin.role,
        either(
            result,
            r -> OptionalDouble.of(r.value()),
            electrode,
            e -> OptionalDouble.of(e.value())),
        origin.unit,
        outcome.reported(),
        either(
            budget,
            made -> OptionalDouble.of(made.standardUncertainty()),
            electrode,
            ElectrodeResult::standardError),
        either(
            budget,
            made -> OptionalDouble.of(made.expandedUncertainty()),
            electrode,
            ElectrodeResult::expandedUncertainty),
        either(
            budget,
            made -> OptionalDouble.of(made.coverageFactor()),
            electrode,
            found -> found.fit().t()),
        either(result, SeriesResult::reportedLower95, electrode, ElectrodeResult::lower95),
        either(result, SeriesResult::reportedUpper95, electrode, ElectrodeResult::upper95),
        either(result, SeriesResult::standardError, electrode, ElectrodeResult::standardError),
        either(result, SeriesResult::lower95, electrode, ElectrodeResult::lower95),
        either(result, SeriesResult::upper95, electrode, ElectrodeResult::upper95),
        basis(result, electrode),
        number(result.flatMap(SeriesResult::detection), d -> OptionalDouble.of(d.detectionLimit())),
        outcome.verdict(),
        outcome.flags().stream().map(flag -> flag.kind().shortName()).toList(),
        outcome.flags().stream().map(Flag::sentence).toList(),
        result
            .map(SeriesResult::flasks)
            .or(() -> electrode.map(ElectrodeResult::flasks))
            .map(List::size)
            .orElse(0),
        origin.readings.size(),
        either(
            line,
            l -> OptionalDouble.of(l.slope()),
            electrode,
            e -> OptionalDouble.of(e.inSignalUnits(e.fit().slope()))),
        number(line, found -> OptionalDouble.of(found.signalIntercept())),
        either(line, StraightLine::residualSd, electrode, ResultRow::scatter),
        line.map(StraightLine::residualDf)
            .or(() -> electrode.map(found -> found.fit().df()))
            .map(OptionalInt::of)
            .orElse(OptionalInt.empty()),
        number(line, StraightLine::correlation),
        origin.design,
        origin.files(),
        result.map(RowEvidence::of).orElse(RowEvidence.EMPTY));
  }

  private static String basis(Optional<SeriesResult> result, Optional<ElectrodeResult> electrode) {
    if (result.flatMap(SeriesResult::reportedPool).isPresent()) {
      return "pool";
    }
    boolean own =
        result.map(SeriesResult::standardError).filter(OptionalDouble::isPresent).isPresent()
            || electrode
                .map(ElectrodeResult::standardError)
                .filter(OptionalDouble::isPresent)
                .isPresent();
    return own ? "own" : "";
  }

  private static OptionalDouble scatter(ElectrodeResult electrode) {
    OptionalDouble millivolts = electrode.fit().residualSd();
    return millivolts.isPresent()
        ? OptionalDouble.of(electrode.inSignalUnits(millivolts.getAsDouble()))
        : millivolts;
  }

  /** The number of the line's result, or of the electrode's where that is the one there is. */
  private static <A, B> OptionalDouble either(
      Optional<A> line,
      Function<A, OptionalDouble> ofLine,
      Optional<B> electrode,
      Function<B, OptionalDouble> ofElectrode) {
    return electrode.isPresent() ? number(electrode, ofElectrode) : number(line, ofLine);
  }

  /** What is known of readings whether they form a series or not. */
  private record Origin(
      String batch, String role, String unit, String design, List<Recorded> readings) {

    static Origin of(Gathered gathered) {
      if (gathered instanceof AdditionSeries series) {
        return new Origin(
            series.batchName(),
            series.role().word(),
            series.toResult().unit().symbol(),
            series.design().word(),
            readings(series));
      }
      Ungrouped ungrouped = (Ungrouped) gathered;
      Optional<FlaskFacts> facts =
          ungrouped.readings().stream().map(recorded -> recorded.reading().facts()).findFirst();
      return new Origin(
          ungrouped.batchName(),
          facts.map(known -> known.role().word()).orElse(""),
          "",
          facts.map(known -> known.design().word()).orElse(""),
          ungrouped.readings());
    }

    private static List<Recorded> readings(AdditionSeries series) {
      List<Recorded> readings = new ArrayList<>();
      for (Flask flask : series.flasks()) {
        readings.addAll(flask.readings());
      }
      return readings;
    }

    List<String> files() {
      SortedSet<String> files = new TreeSet<>();
      for (Recorded recorded : readings) {
        files.add(recorded.reading().position().source().file());
      }
      return List.copyOf(files);
    }
  }

  /** A number of something that may be missing; never one that is not finite, never −0. */
  private static <T> OptionalDouble number(Optional<T> source, Function<T, OptionalDouble> part) {
    OptionalDouble value = source.map(part).orElse(OptionalDouble.empty());
    return value.isPresent() ? FlaskLine.finite(value.getAsDouble() + 0.0) : value;
  }
}
