package org.spikewright.analysis;

import java.util.ArrayList;
import java.util.List;
import java.util.Map;
import java.util.Objects;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.TreeMap;
import java.util.stream.Collectors;
import org.spikewright.analysis.ControlResult.Verdict;
import org.spikewright.analysis.LinesBeside.OfLine;
import org.spikewright.fit.Combination;
import org.spikewright.judgement.CriteriaBook;
import org.spikewright.judgement.Criterion;
import org.spikewright.judgement.Limit;
import org.spikewright.quantity.Estimate;
import org.spikewright.reading.Role;
import org.spikewright.reading.SampleId;
import org.spikewright.reading.Subject;

/** Series held against each other: duplicates, several series of one sample, lines side by side. */
final class Comparisons {
  private final CriteriaBook criteria;

  Comparisons(CriteriaBook criteria) {
    this.criteria = criteria;
  }

  /**
   * A duplicate beside its original; not judged when the night has no original, or when neither is
   * above its critical value.
   */
  DuplicateResult duplicate(ControlRule rule, Measure copy, Optional<Measure> original) {
    SampleId of = rule.parent().flatMap(parent -> parent.of(copy.subject().sample())).orElseThrow();
    Optional<Measure> beside =
        original.filter(other -> other.unit().dimension() == copy.unit().dimension());
    OptionalDouble value =
        beside.isPresent()
            ? OptionalDouble.of(beside.get().value() * beside.get().unit().to(copy.unit()))
            : OptionalDouble.empty();
    OptionalDouble difference =
        value.isPresent() ? difference(copy.value(), value.getAsDouble()) : value;
    Limit general = criteria.of(copy.method()).of(Criterion.DUPLICATES);
    OptionalDouble limit =
        rule.limits().difference().isPresent() || !general.on()
            ? rule.limits().difference()
            : OptionalDouble.of(general.value());
    boolean judged =
        difference.isPresent() && limit.isPresent() && (copy.detected() || beside.get().detected());
    Verdict verdict =
        !judged
            ? Verdict.NOT_JUDGED
            : difference.getAsDouble() <= limit.getAsDouble() ? Verdict.IN : Verdict.OUT;
    return new DuplicateResult(
        rule.name(),
        copy.key(),
        copy.batch().batch(),
        of,
        copy.unit().symbol(),
        copy.value(),
        value,
        difference,
        limit,
        verdict);
  }

  private static OptionalDouble difference(double one, double other) {
    double mean = (one + other) / 2;
    double difference = Math.abs(one - other) / mean;
    return mean > 0 && Double.isFinite(difference)
        ? OptionalDouble.of(difference)
        : OptionalDouble.empty();
  }

  private record Same(Subject subject, String unit) {}

  /** Samples with several series of one analyte and line on one instrument. */
  List<Agreement> agreements(List<Measure> measures) {
    Map<Same, List<Measure>> groups =
        measures.stream()
            .filter(measure -> measure.role() == Role.SAMPLE || measure.role() == Role.CONTROL)
            .filter(measure -> measure.estimate().isPresent())
            .collect(
                Collectors.groupingBy(
                    measure -> new Same(measure.subject(), measure.unit().symbol())));
    return groups.values().stream()
        .filter(group -> group.size() > 1)
        .map(this::agreement)
        .flatMap(Optional::stream)
        .sorted((a, b) -> a.series().get(0).compareTo(b.series().get(0)))
        .toList();
  }

  private Optional<Agreement> agreement(List<Measure> group) {
    List<Estimate> estimates =
        group.stream().map(Measure::estimate).flatMap(Optional::stream).toList();
    Limit limit = criteria.of(group.get(0).method()).of(Criterion.SERIES_AGREEMENT);
    return Combination.of(estimates)
        .map(
            combination ->
                new Agreement(
                    group.stream().map(Measure::key).toList(),
                    group.stream().map(Measure::value).toList(),
                    group.get(0).unit().symbol(),
                    combination,
                    limit.on() ? limit.value() : 0));
  }

  private record SameFlasks(
      String instrument,
      SampleId sample,
      String analyte,
      String batch,
      String preparation,
      int ordinal,
      String unit) {
    static SameFlasks of(Measure measure) {
      Subject subject = measure.subject();
      return new SameFlasks(
          subject.instrument(),
          subject.sample(),
          subject.analyte(),
          measure.batch().batch(),
          measure.key().preparation(),
          measure.key().ordinal(),
          measure.unit().symbol());
    }
  }

  /** Samples whose element was read at several lines. */
  List<LinesBeside> lines(List<Measure> measures) {
    Map<SameFlasks, List<Measure>> groups =
        measures.stream()
            .filter(measure -> !measure.subject().line().isEmpty())
            .collect(Collectors.groupingBy(SameFlasks::of));
    return groups.values().stream()
        .filter(group -> group.size() > 1)
        .map(Comparisons::beside)
        .sorted((a, b) -> a.lines().get(0).series().compareTo(b.lines().get(0).series()))
        .toList();
  }

  private static LinesBeside beside(List<Measure> group) {
    List<OfLine> lines = new ArrayList<>();
    double least = Double.POSITIVE_INFINITY;
    double most = Double.NEGATIVE_INFINITY;
    double sum = 0;
    for (Measure measure : group) {
      lines.add(new OfLine(measure.key(), measure.value(), measure.standardUncertainty()));
      least = Math.min(least, measure.value());
      most = Math.max(most, measure.value());
      sum += measure.value();
    }
    double spread = (most - least) / (sum / group.size());
    return new LinesBeside(
        group.get(0).unit().symbol(),
        List.copyOf(lines),
        sum > 0 && Double.isFinite(spread) ? OptionalDouble.of(spread) : OptionalDouble.empty());
  }

  /** Finds the series that a control or a duplicate is held against: of its batch before others. */
  static Optional<Measure> parent(
      ControlRule rule, Measure measure, Map<SampleId, List<Measure>> all) {
    Optional<SampleId> id = rule.parent().flatMap(parent -> parent.of(measure.subject().sample()));
    List<Measure> candidates =
        id.map(sample -> all.getOrDefault(sample, List.of())).orElse(List.of()).stream()
            .filter(other -> isLike(other, measure))
            .toList();
    return candidates.stream()
        .filter(other -> other.batch().equals(measure.batch()))
        .findFirst()
        .or(() -> candidates.stream().findFirst());
  }

  private static boolean isLike(Measure one, Measure other) {
    return Objects.equals(one.subject().instrument(), other.subject().instrument())
        && one.subject().analyte().equals(other.subject().analyte())
        && one.subject().line().equals(other.subject().line());
  }

  /** The measures by sample, each list in the order of the series. */
  static Map<SampleId, List<Measure>> bySample(List<Measure> measures) {
    return measures.stream()
        .collect(
            Collectors.groupingBy(
                measure -> measure.subject().sample(), TreeMap::new, Collectors.toList()));
  }
}
