package org.spikewright.analysis;

import java.util.ArrayList;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.OptionalDouble;
import org.spikewright.analysis.ControlResult.Verdict;
import org.spikewright.analysis.ControlRule.Kind;
import org.spikewright.judgement.CriteriaBook;
import org.spikewright.judgement.SeriesResult;
import org.spikewright.quantity.Quantity;
import org.spikewright.reading.BatchReading;
import org.spikewright.reading.Role;
import org.spikewright.reading.SampleId;
import org.spikewright.series.AdditionSeries;

/**
 * Gathers, on a first walk over a night's fitted series, what they say about each other: controls,
 * duplicates, blanks, several series of one sample. A few numbers of each series are kept. What it
 * comes to is {@link #evidence()}, which a second walk judges each series by. For one thread.
 */
public final class BatchEvidence {
  private final ControlBook book;
  private final CriteriaBook criteria;
  private final ControlHistory history;
  private final Beside beside;
  private final MatrixEffects matrix;
  private final List<Measure> measures = new ArrayList<>();
  private final List<Without> without = new ArrayList<>();
  private final List<MatrixEffect> effects = new ArrayList<>();

  /**
   * Begins.
   *
   * @param book what the laboratory says about its controls
   * @param criteria the limits where the book sets none
   * @param besideSamples drift checks and calibration solutions of the night
   * @param history of the controls on earlier lab days
   */
  public BatchEvidence(
      ControlBook book,
      CriteriaBook criteria,
      List<BatchReading> besideSamples,
      ControlHistory history) {
    this.book = book;
    this.criteria = criteria;
    this.history = history;
    this.beside = new Beside(besideSamples);
    this.matrix = new MatrixEffects(beside);
  }

  /** Takes a fitted series; all of a night are taken in the order of their keys. */
  public void add(AdditionSeries series, SeriesResult result) {
    measures.add(Measure.of(series, result));
    if (series.role() != Role.BLANK) {
      matrix
          .of(series, result, criteria.of(series.method().name()).of(MatrixEffects.criterion()))
          .ifPresent(effects::add);
    }
  }

  /** Takes a series whose flasks gave no result. */
  public void addWithout(AdditionSeries series, String reason) {
    without.add(new Without(series.key(), BatchKey.of(series), series.role(), reason));
  }

  /** What the series taken so far say. */
  public Evidence evidence() {
    Controls controls = new Controls(criteria, history);
    Comparisons comparisons = new Comparisons(criteria);
    Map<SampleId, List<Measure>> bySample = Comparisons.bySample(measures);
    List<ControlResult> controlResults = new ArrayList<>();
    List<DuplicateResult> duplicates = new ArrayList<>();
    List<BlankResult> blanks = new ArrayList<>();
    for (Measure measure : measures) {
      Optional<ControlRule> rule = book.of(measure.subject());
      if (measure.role() == Role.BLANK
          || rule.map(ControlRule::kind).equals(Optional.of(Kind.BLANK))) {
        blanks.add(blank(rule.filter(one -> one.kind() == Kind.BLANK), measure));
      } else if (rule.isPresent()) {
        Optional<Measure> parent = Comparisons.parent(rule.get(), measure, bySample);
        switch (rule.get().kind()) {
          case CONTROL_SAMPLE, REFERENCE_MATERIAL ->
              controlResults.add(controls.ofReference(rule.get(), measure));
          case SPIKED_CONTROL -> controlResults.add(controls.ofSpike(rule.get(), measure, parent));
          case DUPLICATE -> duplicates.add(comparisons.duplicate(rule.get(), measure, parent));
          case BLANK -> throw new IllegalStateException("a blank is no control");
        }
      } else if (measure.role() == Role.CONTROL) {
        controlResults.add(controls.unknown(measure));
      }
    }
    for (Without series : without) {
      book.of(series.key().subject())
          .filter(rule -> rule.kind().hasReference())
          .ifPresent(rule -> controlResults.add(controls.without(rule, series)));
    }
    return new Evidence(
        new Evidence.Found(
            controlResults,
            duplicates,
            blanks,
            new Checks(beside, criteria).all(),
            effects,
            comparisons.agreements(measures),
            comparisons.lines(measures),
            history),
        new Checks(beside, criteria),
        criteria);
  }

  private static BlankResult blank(Optional<ControlRule> rule, Measure measure) {
    String name = rule.map(ControlRule::name).orElse(measure.subject().sample().text());
    Optional<Quantity> most =
        rule.flatMap(one -> one.limits().most().of(measure.subject().analyte()))
            .filter(limit -> limit.unit().dimension() == measure.unit().dimension());
    OptionalDouble limit =
        most.isPresent()
            ? OptionalDouble.of(most.get().in(measure.unit()))
            : OptionalDouble.empty();
    Verdict verdict =
        limit.isEmpty()
            ? Verdict.NOT_JUDGED
            : measure.value() <= limit.getAsDouble() ? Verdict.IN : Verdict.OUT;
    return new BlankResult(
        Controls.key(name, Kind.BLANK, measure.subject()),
        measure.key(),
        measure.batch().batch(),
        measure.unit().symbol(),
        measure.value(),
        measure.standardUncertainty(),
        measure.detected(),
        measure.inSolution(),
        measure.solutionUnit().symbol(),
        limit,
        verdict);
  }
}
