package org.spikewright.ledger;

import java.util.Optional;
import java.util.OptionalDouble;
import java.util.function.Function;
import org.spikewright.quantity.Unit;
import org.spikewright.reading.Calculation;
import org.spikewright.reading.MethodFacts;
import org.spikewright.reading.MethodFacts.Electrode;
import org.spikewright.reading.MethodFacts.WorkingRange;

/** What a method says, as fields; the names of the enum constants are part of stored ledgers. */
final class MethodCodec {
  private MethodCodec() {}

  static void encode(Fields.Writer out, MethodFacts method, Function<Unit, String> unit) {
    out.add(method.name()).add(unit.apply(method.resultUnit())).add(method.expectedFlasks());
    out.add(method.fitReadings() ? "readings" : "");
    out.add(method.trustedSignal()).add(method.reportingLimit()).add(method.targetUncertainty());
    Optional<WorkingRange> range = method.workingRange();
    out.add(range.map(r -> ExactDouble.text(r.lower())).orElse(""));
    out.add(range.map(r -> ExactDouble.text(r.upper())).orElse(""));
    out.add(method.bendAllowance()).add(method.blankDue() ? "due" : "");
    Calculation calculation = method.calculation();
    out.add(calculation.interval().name()).add(calculation.weights().name());
    out.add(calculation.bend().name()).add(calculation.correctDrift() ? "drift" : "");
    Optional<Electrode> electrode = method.electrode();
    out.add(electrode.map(e -> Integer.toString(e.charge())).orElse(""));
    out.add(electrode.map(Electrode::slope).orElse(OptionalDouble.empty()));
    out.add(electrode.map(Electrode::celsius).orElse(OptionalDouble.empty()));
    out.add(method.signalUnit().map(unit).orElse(""));
  }

  static MethodFacts decode(Fields.Reader in, Function<String, Unit> unit) {
    return new MethodFacts(
        in.text(),
        unit.apply(in.text()),
        in.number(),
        !in.text().isEmpty(),
        in.optionalDouble(),
        in.optionalDouble(),
        in.optionalDouble(),
        range(in.optionalDouble(), in.optionalDouble()),
        in.optionalDouble(),
        !in.text().isEmpty(),
        new Calculation(
            Calculation.Interval.valueOf(in.text()),
            Calculation.Weights.valueOf(in.text()),
            Calculation.Bend.valueOf(in.text()),
            !in.text().isEmpty()),
        electrode(in.text(), in.optionalDouble(), in.optionalDouble()),
        optional(in.text(), unit));
  }

  private static Optional<Unit> optional(String symbol, Function<String, Unit> unit) {
    return symbol.isEmpty() ? Optional.empty() : Optional.of(unit.apply(symbol));
  }

  private static Optional<WorkingRange> range(OptionalDouble lower, OptionalDouble upper) {
    return lower.isPresent() && upper.isPresent()
        ? Optional.of(new WorkingRange(lower.getAsDouble(), upper.getAsDouble()))
        : Optional.empty();
  }

  private static Optional<Electrode> electrode(
      String charge, OptionalDouble slope, OptionalDouble celsius) {
    return charge.isEmpty()
        ? Optional.empty()
        : Optional.of(new Electrode(Integer.parseInt(charge), slope, celsius));
  }
}
