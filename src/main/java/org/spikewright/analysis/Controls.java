package org.spikewright.analysis;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.HashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.OptionalDouble;
import org.spikewright.analysis.ControlResult.Verdict;
import org.spikewright.analysis.ControlRule.Certified;
import org.spikewright.analysis.ControlRule.Kind;
import org.spikewright.analysis.ControlRule.Range;
import org.spikewright.fit.ControlLimits;
import org.spikewright.judgement.CriteriaBook;
import org.spikewright.judgement.Criterion;
import org.spikewright.judgement.Limit;
import org.spikewright.quantity.Quantity;
import org.spikewright.quantity.Unit;
import org.spikewright.reading.Subject;

/** Holds control samples, reference materials and spiked controls against what is known of them. */
final class Controls {
  /** Coverage factor of expanded uncertainties in the E_n score. */
  private static final double COVERAGE = 2;

  private final CriteriaBook criteria;
  private final ControlHistory history;
  private final Map<ControlKey, List<Double>> today = new HashMap<>();

  Controls(CriteriaBook criteria, ControlHistory history) {
    this.criteria = criteria;
    this.history = history;
  }

  static ControlKey key(String name, Kind kind, Subject subject) {
    return new ControlKey(name, kind, subject.instrument(), subject.analyte(), subject.line());
  }

  /** Its value over the known one, and how far off that is. */
  private record Scores(
      OptionalDouble reference,
      OptionalDouble referenceUncertainty,
      OptionalDouble recovery,
      OptionalDouble z,
      OptionalDouble en) {
    static final Scores NONE =
        new Scores(
            OptionalDouble.empty(),
            OptionalDouble.empty(),
            OptionalDouble.empty(),
            OptionalDouble.empty(),
            OptionalDouble.empty());
  }

  /** What a control is held against. */
  private record Bounds(
      OptionalDouble lower, OptionalDouble upper, OptionalDouble en, String from) {
    static final Bounds NONE =
        new Bounds(OptionalDouble.empty(), OptionalDouble.empty(), OptionalDouble.empty(), "");
  }

  /** A control that the laboratory declares in the mapping and says nothing about. */
  ControlResult unknown(Measure measure) {
    ControlKey key = key(measure.subject().sample().text(), Kind.CONTROL_SAMPLE, measure.subject());
    return result(key, measure, Scores.NONE, Bounds.NONE, Optional.of("no entry in controls.toml"));
  }

  /** A control sample or a reference material. */
  ControlResult ofReference(ControlRule rule, Measure measure) {
    ControlKey key = key(rule.name(), rule.kind(), measure.subject());
    Certified certified = rule.reference().of(measure.subject().analyte()).orElseThrow();
    Unit unit = measure.unit();
    if (certified.value().unit().dimension() != unit.dimension()) {
      return result(key, measure, Scores.NONE, Bounds.NONE, Optional.of(unlike(certified, unit)));
    }
    double reference = certified.value().in(unit);
    double scale = certified.value().unit().to(unit);
    double u = certified.standardUncertainty().orElse(0) * scale;
    OptionalDouble sd = sd(rule, measure);
    Scores scores =
        new Scores(
            OptionalDouble.of(reference),
            scaled(certified.standardUncertainty(), scale),
            finite(measure.value() / reference),
            sd.isPresent()
                ? ControlLimits.z(measure.value(), reference, sd.getAsDouble())
                : OptionalDouble.empty(),
            measure.expanded().isPresent()
                ? ControlLimits.en(
                    measure.value(), measure.expanded().getAsDouble(), reference, COVERAGE * u)
                : OptionalDouble.empty());
    return result(key, measure, scores, bounds(rule, measure, reference), Optional.empty());
  }

  /**
   * A spiked control beside its parent.
   *
   * @param parent the sample it was made from; empty when the night has no result of it
   */
  ControlResult ofSpike(ControlRule rule, Measure measure, Optional<Measure> parent) {
    ControlKey key = key(rule.name(), rule.kind(), measure.subject());
    Certified added = rule.reference().of(measure.subject().analyte()).orElseThrow();
    Unit unit = measure.unit();
    if (added.value().unit().dimension() != unit.dimension()) {
      return result(key, measure, Scores.NONE, Bounds.NONE, Optional.of(unlike(added, unit)));
    }
    double amount = added.value().in(unit);
    OptionalDouble none = OptionalDouble.empty();
    Scores known =
        new Scores(
            OptionalDouble.of(amount),
            scaled(added.standardUncertainty(), added.value().unit().to(unit)),
            none,
            none,
            none);
    if (parent.isEmpty() || parent.get().unit().dimension() != unit.dimension()) {
      String whose =
          rule.parent()
              .flatMap(of -> of.of(measure.subject().sample()))
              .map(Object::toString)
              .orElse("");
      return result(
          key, measure, known, Bounds.NONE, Optional.of("no result of its parent " + whose));
    }
    double before = parent.get().value() * parent.get().unit().to(unit);
    Scores scores =
        new Scores(
            known.reference(),
            known.referenceUncertainty(),
            finite((measure.value() - before) / amount),
            none,
            none);
    return result(key, measure, scores, bounds(rule, measure, 1), Optional.empty());
  }

  /** A control whose flasks gave no result: nobody can say that the batch was in order. */
  ControlResult without(ControlRule rule, Without series) {
    OptionalDouble none = OptionalDouble.empty();
    return new ControlResult(
        key(rule.name(), rule.kind(), series.key().subject()),
        series.key(),
        series.batch().batch(),
        "",
        none,
        none,
        none,
        none,
        none,
        none,
        none,
        none,
        none,
        "",
        Optional.empty(),
        Optional.empty(),
        Verdict.OUT,
        "no result: " + series.reason());
  }

  private static String unlike(Certified certified, Unit unit) {
    return "known as " + certified.value() + ", which cannot be held against a result in " + unit;
  }

  private static OptionalDouble scaled(OptionalDouble value, double factor) {
    return value.isPresent() ? OptionalDouble.of(value.getAsDouble() * factor) : value;
  }

  private static OptionalDouble finite(double value) {
    return Double.isFinite(value) ? OptionalDouble.of(value) : OptionalDouble.empty();
  }

  private static OptionalDouble sd(ControlRule rule, Measure measure) {
    Optional<Quantity> sd =
        rule.limits()
            .sd()
            .of(measure.subject().analyte())
            .filter(one -> one.unit().dimension() == measure.unit().dimension());
    return sd.isPresent() ? OptionalDouble.of(sd.get().in(measure.unit())) : OptionalDouble.empty();
  }

  /** The limits on the chart's scale; the laboratory's own go before the general criterion. */
  private Bounds bounds(ControlRule rule, Measure measure, double reference) {
    if (rule.limits().recovery().isPresent()) {
      Range range = rule.limits().recovery().get();
      return bounds(
          range.lower() * reference, range.upper() * reference, "recovery " + shown(range));
    }
    OptionalDouble sd = sd(rule, measure);
    if (rule.limits().z().isPresent() && sd.isPresent()) {
      double z = rule.limits().z().getAsDouble();
      double width = z * sd.getAsDouble();
      return bounds(reference - width, reference + width, "|z| up to " + Say.n(z));
    }
    if (rule.limits().en().isPresent()) {
      return new Bounds(
          OptionalDouble.empty(),
          OptionalDouble.empty(),
          rule.limits().en(),
          "|E_n| up to " + Say.n(rule.limits().en().getAsDouble()));
    }
    Limit limit = criteria.of(measure.method()).of(Criterion.RECOVERY);
    if (!limit.on()) {
      return Bounds.NONE;
    }
    Range range = new Range(1 - limit.value(), 1 + limit.value());
    return bounds(
        range.lower() * reference,
        range.upper() * reference,
        "recovery " + shown(range) + " (" + limit.source().words() + ")");
  }

  private static Bounds bounds(double lower, double upper, String from) {
    return new Bounds(
        OptionalDouble.of(lower), OptionalDouble.of(upper), OptionalDouble.empty(), from);
  }

  private static String shown(Range range) {
    return Say.share(range.lower()) + " to " + Say.share(range.upper());
  }

  private ControlResult result(
      ControlKey key, Measure measure, Scores scores, Bounds bounds, Optional<String> obstacle) {
    OptionalDouble plotted =
        key.kind() == Kind.SPIKED_CONTROL ? scores.recovery() : OptionalDouble.of(measure.value());
    String plottedUnit = key.kind() == Kind.SPIKED_CONTROL ? "1" : measure.unit().symbol();
    Optional<ControlLimits> chart = history.limits(key, plottedUnit);
    Optional<ControlLimits.Standing> standing =
        plotted.isPresent()
            ? standing(key, plottedUnit, plotted.getAsDouble(), chart)
            : Optional.empty();
    List<String> outs = obstacle.isPresent() ? List.of() : outs(plotted, scores, bounds, standing);
    boolean judged = obstacle.isEmpty() && (!bounds.from().isEmpty() || standing.isPresent());
    Verdict verdict = !outs.isEmpty() ? Verdict.OUT : judged ? Verdict.IN : Verdict.NOT_JUDGED;
    return new ControlResult(
        key,
        measure.key(),
        measure.batch().batch(),
        measure.unit().symbol(),
        OptionalDouble.of(measure.value()),
        measure.standardUncertainty(),
        scores.reference(),
        scores.referenceUncertainty(),
        scores.recovery(),
        scores.z(),
        scores.en(),
        bounds.lower(),
        bounds.upper(),
        bounds.from(),
        chart,
        standing,
        verdict,
        obstacle.orElse(String.join("; ", outs)));
  }

  /** Only limits that are more than provisional judge. */
  private Optional<ControlLimits.Standing> standing(
      ControlKey key, String unit, double value, Optional<ControlLimits> chart) {
    List<Double> points = today.computeIfAbsent(key, k -> new ArrayList<>());
    points.add(value);
    if (chart.isEmpty() || chart.get().provisional()) {
      return Optional.empty();
    }
    double[] past = history.values(key, unit);
    double[] all = Arrays.copyOf(past, past.length + points.size());
    for (int i = 0; i < points.size(); i++) {
      all[past.length + i] = points.get(i);
    }
    return Optional.of(chart.get().standing(all));
  }

  private static List<String> outs(
      OptionalDouble plotted,
      Scores scores,
      Bounds bounds,
      Optional<ControlLimits.Standing> standing) {
    List<String> outs = new ArrayList<>();
    boolean within =
        plotted.isPresent()
            && new Range(
                    bounds.lower().orElse(Double.NEGATIVE_INFINITY),
                    bounds.upper().orElse(Double.POSITIVE_INFINITY))
                .holds(plotted.getAsDouble());
    if (plotted.isPresent() && !within) {
      outs.add("outside " + bounds.from());
    }
    boolean byEn = bounds.en().isPresent() && scores.en().isPresent();
    if (byEn && !(Math.abs(scores.en().getAsDouble()) <= bounds.en().getAsDouble())) {
      outs.add("E_n " + Say.n(scores.en().getAsDouble()));
    }
    standing.ifPresent(
        of -> {
          if (of == ControlLimits.Standing.ACTION) {
            outs.add("beyond an action limit of its chart");
          } else if (of == ControlLimits.Standing.TWO_OF_THREE) {
            outs.add("two of three results beyond a warning limit of its chart");
          }
        });
    return outs;
  }
}
