package org.spikewright.ledger;

import java.util.ArrayList;
import java.util.HashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.OptionalDouble;
import org.spikewright.quantity.Dimension;
import org.spikewright.quantity.Measured;
import org.spikewright.quantity.Quantity;
import org.spikewright.quantity.Unit;
import org.spikewright.reading.Addition;
import org.spikewright.reading.Blanks;
import org.spikewright.reading.Design;
import org.spikewright.reading.FlaskFacts;
import org.spikewright.reading.InternalStandard;
import org.spikewright.reading.Preparation;
import org.spikewright.reading.Role;

/**
 * Facts of a flask as canonical text: equal facts give equal texts, and the text gives back every
 * double and unit exactly. Quantities read {@code 20 mL}, or {@code 20~0.03 mL} with a tolerance.
 * The names of the enum constants are part of stored ledgers.
 */
final class FactsCodec {
  private static final Map<String, Unit> TABLE = new HashMap<>();
  private static final String STOCK = "stock";
  private static final String STOCKS = "stocks";
  private static final String STATED = "stated";
  private static final char FOREIGN = '!';

  static {
    for (String symbol : Unit.symbols()) {
      TABLE.put(symbol, Unit.of(symbol));
    }
  }

  private FactsCodec() {}

  static String encode(FlaskFacts facts) {
    Fields.Writer out = new Fields.Writer();
    out.add(facts.role().name()).add(facts.design().name());
    addition(out, facts.addition());
    out.add(optional(facts.aliquot()));
    out.add(optional(facts.finalVolume()));
    out.add(optional(facts.startVolume()));
    preparation(out, facts.preparation());
    Blanks blanks = facts.blanks();
    out.add(blanks.baseline()).add(optional(blanks.method())).add(optional(blanks.solvent()));
    MethodCodec.encode(out, facts.method(), FactsCodec::unit);
    InternalStandard standard = facts.internalStandard().orElse(null);
    out.add(standard == null ? "" : standard.given().name());
    out.add(standard == null ? "" : optional(standard.mass()));
    out.add(standard == null ? OptionalDouble.empty() : standard.baseline());
    AccuracyCodec.encode(out, facts.accuracies());
    AccuracyCodec.encodeBottle(out, facts.bottle());
    return out.toString();
  }

  static FlaskFacts decode(String content) {
    Fields.Reader in = new Fields.Reader(content);
    return new FlaskFacts(
        Role.valueOf(in.text()),
        Design.valueOf(in.text()),
        addition(in),
        optionalMeasured(in.text()),
        optionalMeasured(in.text()),
        optionalMeasured(in.text()),
        preparation(in),
        new Blanks(in.optionalDouble(), optionalMeasured(in.text()), optionalMeasured(in.text())),
        MethodCodec.decode(in, FactsCodec::unit),
        standard(in.text(), in.text(), in.optionalDouble()),
        AccuracyCodec.decode(in),
        AccuracyCodec.bottle(in));
  }

  private static Optional<InternalStandard> standard(
      String given, String mass, OptionalDouble baseline) {
    return given.isEmpty()
        ? Optional.empty()
        : Optional.of(
            new InternalStandard(
                InternalStandard.Given.valueOf(given), optionalMeasured(mass), baseline));
  }

  /**
   * What tells one preparation from another: its name where it has one, whatever else is known of
   * it; else the set of the others.
   */
  static String identity(Preparation preparation) {
    if (preparation.name().isPresent()) {
      return "=" + preparation.name().get();
    }
    Fields.Writer out = new Fields.Writer();
    preparation(out, preparation);
    return out.toString();
  }

  private static void addition(Fields.Writer out, Addition addition) {
    if (addition instanceof Addition.OfStock spike) {
      out.add(STOCK);
      portion(out, spike);
    } else if (addition instanceof Addition.OfStocks several) {
      out.add(STOCKS).add(several.portions().size());
      several.portions().forEach(portion -> portion(out, portion));
    } else if (addition instanceof Addition.Stated stated) {
      out.add(STATED).add(measured(Measured.exactly(stated.concentration())));
      out.add(stated.terms().name());
    }
  }

  private static void portion(Fields.Writer out, Addition.OfStock portion) {
    out.add(measured(Measured.exactly(portion.delivered()))).add(measured(portion.stock()));
  }

  private static Addition addition(Fields.Reader in) {
    return switch (in.text()) {
      case STOCK -> portion(in);
      case STOCKS -> portions(in);
      default ->
          new Addition.Stated(measured(in.text()).quantity(), Addition.Terms.valueOf(in.text()));
    };
  }

  private static Addition portions(Fields.Reader in) {
    int size = in.number();
    List<Addition.OfStock> portions = new ArrayList<>(size);
    for (int i = 0; i < size; i++) {
      portions.add(portion(in));
    }
    return new Addition.OfStocks(portions);
  }

  private static Addition.OfStock portion(Fields.Reader in) {
    return new Addition.OfStock(measured(in.text()).quantity(), measured(in.text()));
  }

  private static void preparation(Fields.Writer out, Preparation preparation) {
    out.add(preparation.name().map(name -> "=" + name).orElse(""));
    out.add(ExactDouble.text(preparation.dilution()));
    out.add(optional(preparation.testPortion().map(Measured::exactly)));
    out.add(optional(preparation.digestVolume().map(Measured::exactly)));
    out.add(preparation.dryMassFraction());
  }

  private static Preparation preparation(Fields.Reader in) {
    String name = in.text();
    return new Preparation(
        name.isEmpty() ? Optional.empty() : Optional.of(name.substring(1)),
        ExactDouble.parse(in.text()),
        optionalMeasured(in.text()).map(Measured::quantity),
        optionalMeasured(in.text()).map(Measured::quantity),
        in.optionalDouble());
  }

  private static String optional(Optional<Measured> measured) {
    return measured.map(FactsCodec::measured).orElse("");
  }

  private static Optional<Measured> optionalMeasured(String field) {
    return field.isEmpty() ? Optional.empty() : Optional.of(measured(field));
  }

  private static String measured(Measured measured) {
    String number = ExactDouble.text(measured.quantity().value());
    String tolerance =
        measured.tolerance().isPresent()
            ? "~" + ExactDouble.text(measured.tolerance().getAsDouble())
            : "";
    return number + tolerance + " " + unit(measured.quantity().unit());
  }

  private static Measured measured(String field) {
    int blank = field.indexOf(' ');
    String number = field.substring(0, blank);
    int tilde = number.indexOf('~');
    double value = ExactDouble.parse(tilde < 0 ? number : number.substring(0, tilde));
    OptionalDouble tolerance =
        tilde < 0
            ? OptionalDouble.empty()
            : OptionalDouble.of(ExactDouble.parse(number.substring(tilde + 1)));
    return new Measured(new Quantity(value, unit(field.substring(blank + 1))), tolerance);
  }

  /** The symbol, or everything about a unit that is not in the table. */
  private static String unit(Unit unit) {
    if (unit.equals(TABLE.get(unit.symbol()))) {
      return unit.symbol();
    }
    String size = ExactDouble.text(unit.perBase());
    return FOREIGN + unit.dimension().name() + FOREIGN + size + FOREIGN + unit.symbol();
  }

  private static Unit unit(String text) {
    if (text.isEmpty() || text.charAt(0) != FOREIGN) {
      Unit unit = TABLE.get(text);
      if (unit == null) {
        throw new IllegalStateException("the ledger names a unit that is unknown: " + text);
      }
      return unit;
    }
    int first = text.indexOf(FOREIGN, 1);
    int second = text.indexOf(FOREIGN, first + 1);
    return new Unit(
        text.substring(second + 1),
        Dimension.valueOf(text.substring(1, first)),
        ExactDouble.parse(text.substring(first + 1, second)));
  }
}
