package org.spikewright.analysis;

import java.util.ArrayList;
import java.util.HashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.stream.Collectors;
import java.util.stream.Stream;
import org.spikewright.analysis.ControlResult.Verdict;
import org.spikewright.judgement.CriteriaBook;
import org.spikewright.judgement.Criterion;
import org.spikewright.judgement.Flag;
import org.spikewright.judgement.FlagKind;
import org.spikewright.judgement.Limit;
import org.spikewright.judgement.SeriesResult;
import org.spikewright.quantity.Measured;
import org.spikewright.quantity.Unit;
import org.spikewright.reading.BatchReading;
import org.spikewright.reading.Role;
import org.spikewright.series.AdditionSeries;
import org.spikewright.series.SeriesKey;

/** What a night's series say about each other, and what follows for each of them. */
public final class Evidence {
  /** No series, no controls. */
  public static final Evidence NONE = none();

  /**
   * What was found, each list in the order of its series.
   *
   * @param controls control samples, reference materials and spiked controls
   * @param duplicates duplicates beside their originals
   * @param blanks blanks measured as series
   * @param checks runs of drift checks
   * @param matrixEffects sensitivities beside those of external calibrations
   * @param agreements several series of one sample
   * @param lines several lines of one element
   * @param history what the limits of the charts were drawn from
   */
  public record Found(
      List<ControlResult> controls,
      List<DuplicateResult> duplicates,
      List<BlankResult> blanks,
      List<CheckResult> checks,
      List<MatrixEffect> matrixEffects,
      List<Agreement> agreements,
      List<LinesBeside> lines,
      ControlHistory history) {
    /** Copies the lists. */
    public Found {
      controls = List.copyOf(controls);
      duplicates = List.copyOf(duplicates);
      blanks = List.copyOf(blanks);
      checks = List.copyOf(checks);
      matrixEffects = List.copyOf(matrixEffects);
      agreements = List.copyOf(agreements);
      lines = List.copyOf(lines);
    }

    /** The points that the night adds to the history, in order. */
    public List<ControlPoint> points() {
      return Stream.concat(
              controls.stream().map(ControlResult::point).flatMap(Optional::stream),
              blanks.stream().map(BlankResult::point))
          .toList();
    }
  }

  private final Found found;
  private final Checks checks;
  private final CriteriaBook criteria;
  private final Map<BatchKey, List<Flag>> ofBatch = new HashMap<>();
  private final Map<BatchKey, List<BlankResult>> blanks;
  private final Map<SeriesKey, Flag> disagreeing = new HashMap<>();

  Evidence(Found found, Checks checks, CriteriaBook criteria) {
    this.found = found;
    this.checks = checks;
    this.criteria = criteria;
    for (ControlResult control : found.controls()) {
      if (control.verdict() == Verdict.OUT) {
        add(BatchFlags.key(control.series(), control.batch()), BatchFlags.of(control));
      }
    }
    for (DuplicateResult duplicate : found.duplicates()) {
      if (duplicate.verdict() == Verdict.OUT) {
        add(BatchFlags.key(duplicate.series(), duplicate.batch()), BatchFlags.of(duplicate));
      }
    }
    for (BlankResult blank : found.blanks()) {
      if (blank.verdict() == Verdict.OUT) {
        add(BatchFlags.key(blank.series(), blank.batch()), BatchFlags.of(blank));
      }
    }
    for (Agreement agreement : found.agreements()) {
      if (!agreement.agree()) {
        agreement.series().forEach(key -> disagreeing.put(key, BatchFlags.of(agreement)));
      }
    }
    this.blanks =
        found.blanks().stream()
            .collect(Collectors.groupingBy(blank -> BatchFlags.key(blank.series(), blank.batch())));
  }

  private static Evidence none() {
    return new BatchEvidence(
            ControlBook.EMPTY,
            CriteriaBook.defaults(),
            List.<BatchReading>of(),
            ControlHistory.NONE)
        .evidence();
  }

  private void add(BatchKey key, Flag flag) {
    ofBatch.computeIfAbsent(key, k -> new ArrayList<>()).add(flag);
  }

  /** What was found. */
  public Found found() {
    return found;
  }

  /**
   * What follows for a series of the night: flags of its batch's controls, duplicates, blanks and
   * drift checks, and whether it disagrees with other series of its sample. Blanks themselves are
   * only held against drift checks.
   */
  public List<Flag> flagsFor(AdditionSeries series, SeriesResult result) {
    List<Flag> flags = new ArrayList<>();
    checks.flagFor(series).ifPresent(flags::add);
    if (series.role() == Role.BLANK) {
      return flags;
    }
    flags.addAll(ofBatch.getOrDefault(BatchKey.of(series), List.of()));
    Flag disagrees = disagreeing.get(series.key());
    if (disagrees != null) {
      flags.add(disagrees);
    }
    if (blanksOf(series).stream().noneMatch(blank -> blank.series().equals(series.key()))) {
      blankMissing(series).or(() -> blankHigh(series, result)).ifPresent(flags::add);
    }
    return List.copyOf(flags);
  }

  private List<BlankResult> blanksOf(AdditionSeries series) {
    return blanks.getOrDefault(BatchKey.of(series), List.of());
  }

  private static Optional<Measured> mappedBlank(AdditionSeries series) {
    return series.flasks().get(0).facts().blanks().method();
  }

  private Optional<Flag> blankMissing(AdditionSeries series) {
    boolean there = mappedBlank(series).isPresent() || !blanksOf(series).isEmpty();
    return series.method().blankDue() && !there
        ? Optional.of(
            Say.plain(
                FlagKind.BLANK_MISSING,
                Flag.Weight.REVIEW,
                "The method asks for a blank, and the batch has none.",
                "Measure a blank that was carried through the preparation; additions do not cure"
                    + " what reagents bring in."))
        : Optional.empty();
  }

  /**
   * The largest blank of the batch over the result, both as concentrations in the digest or
   * undiluted solution. A blank in which nothing was detected does not count.
   */
  private Optional<Flag> blankHigh(AdditionSeries series, SeriesResult result) {
    Limit limit = criteria.of(series.method().name()).of(Criterion.BLANK_HIGH);
    OptionalDouble blank = largestBlank(series);
    double inSolution =
        result.estimate().value() * series.toResult().dilution() - series.toResult().methodBlank();
    if (!limit.on() || blank.isEmpty() || !(inSolution > 0) || !detected(result)) {
      return Optional.empty();
    }
    double share = blank.getAsDouble() / inSolution;
    return share > limit.value()
        ? Optional.of(
            Say.review(
                FlagKind.BLANK_HIGH,
                share,
                limit,
                "The blank is "
                    + Say.share(share)
                    + " of the result; the limit is "
                    + Say.share(limit.value())
                    + ".",
                "Find out where it comes from; subtract it only by the method's own rule."))
        : Optional.empty();
  }

  private static boolean detected(SeriesResult result) {
    return result.detection().map(d -> result.value() > d.criticalValue()).orElse(true);
  }

  private OptionalDouble largestBlank(AdditionSeries series) {
    Unit axis = series.axisUnit();
    OptionalDouble mapped =
        mappedBlank(series).isPresent()
            ? OptionalDouble.of(mappedBlank(series).get().in(axis))
            : OptionalDouble.empty();
    OptionalDouble measured =
        blanksOf(series).stream()
            .filter(BlankResult::detected)
            .filter(blank -> Unit.of(blank.solutionUnit()).dimension() == axis.dimension())
            .mapToDouble(blank -> blank.inSolution() * Unit.of(blank.solutionUnit()).to(axis))
            .max();
    return Stream.of(mapped, measured)
        .filter(OptionalDouble::isPresent)
        .mapToDouble(OptionalDouble::getAsDouble)
        .max();
  }
}
