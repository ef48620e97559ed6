package org.spikewright.mapping;

import java.util.Arrays;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.stream.IntStream;
import java.util.stream.Stream;
import org.spikewright.quantity.Measured;
import org.spikewright.quantity.NumberGrammar;
import org.spikewright.quantity.Quantity;
import org.spikewright.quantity.Unit;
import org.spikewright.reading.Role;
import org.spikewright.table.Cell;
import org.spikewright.table.Position;
import org.spikewright.table.Row;

/** What the texts of one table say about the decimal mark. */
final class NumberEvidence {
  /** What one number says. */
  enum Verdict {
    /** It is a number with a decimal point only. */
    POINT,
    /** With a decimal comma only. */
    COMMA,
    /** With either, but not the same number. */
    EITHER,
    /** The same number with either, or none at all. */
    NOTHING
  }

  /**
   * A number that says something.
   *
   * @param verdict what it says
   * @param text as it stands
   * @param position where
   * @param readings what it would be, with a point and with a comma; of use where it is either
   */
  record Witness(Verdict verdict, String text, Position position, String readings) {}

  private static final List<Fact> NUMBERS =
      Arrays.stream(Fact.values())
          .filter(
              fact ->
                  switch (fact.kind()) {
                    case SIGNAL, SPREAD, AMOUNT, DILUTION -> true;
                    case NAME, TOOL, TIME -> false;
                  })
          .toList();

  private final Mapping mapping;
  private final RowLookup lookup;
  private final RowFilter filter;
  private final List<Fact> ofFlask;
  private final List<Fact> ofCheck;
  private final List<Fact> ofCalibration;
  private final int[] columns;
  private final boolean inNames;
  private final List<NumberGrammar> point;
  private final List<NumberGrammar> comma;

  NumberEvidence(Mapping mapping, Header header, Map<Fact, List<Outside>> around) {
    this.mapping = mapping;
    this.lookup = new RowLookup(mapping.places(), header, around);
    this.filter = new RowFilter(mapping.rows(), header);
    List<Fact> read = NUMBERS.stream().filter(fact -> mapping.places().isRead(fact)).toList();
    this.ofFlask = read.stream().filter(fact -> fact != Fact.CALIBRATION_CONCENTRATION).toList();
    this.ofCheck = read.stream().filter(fact -> fact.kind() == Fact.Kind.SIGNAL).toList();
    // Where no concentration is mapped their rows are skipped.
    this.ofCalibration =
        read.contains(Fact.CALIBRATION_CONCENTRATION)
            ? Stream.concat(ofCheck.stream(), Stream.of(Fact.CALIBRATION_CONCENTRATION)).toList()
            : List.of();
    this.columns = columns(mapping.places(), header);
    this.inNames = read.stream().anyMatch(around::containsKey);
    Optional<Character> thousands = mapping.notation().numbers().thousandsMark();
    this.point = grammars('.', ',', thousands);
    this.comma = grammars(',', '.', thousands);
  }

  /** As declared, else plain first and grouped by the other mark second. */
  private static List<NumberGrammar> grammars(
      char mark, char other, Optional<Character> thousands) {
    if (thousands.isEmpty()) {
      return List.of(
          new NumberGrammar(mark, Optional.empty()), new NumberGrammar(mark, Optional.of(other)));
    }
    return thousands.get() == mark ? List.of() : List.of(new NumberGrammar(mark, thousands));
  }

  private static int[] columns(Places places, Header header) {
    return IntStream.concat(
            NUMBERS.stream()
                .filter(places.columns()::containsKey)
                .flatMap(fact -> places.columns().get(fact).headers().stream())
                .mapToInt(name -> header.find(name).orElseThrow()),
            places.labels().stream().mapToInt(label -> header.find(label.header()).orElseThrow()))
        .distinct()
        .toArray();
  }

  /** The first number of a row that says something. */
  Optional<Witness> in(Row row) {
    if (!mayHoldMarks(row) || !(filter.kind(row) instanceof RowFilter.Kind.Measured measured)) {
      return Optional.empty();
    }
    boolean isUnderstood = lookup.begin(row).isEmpty();
    Optional<Witness> either = Optional.empty();
    for (Fact fact : read(measured.role(), isUnderstood)) {
      Optional<Given> given = lookup.find(fact);
      if (given.isPresent() && given.get().cell() instanceof Cell.Text text) {
        Witness witness = witness(fact, given.get(), text.text(), row);
        if (witness.verdict() == Verdict.POINT || witness.verdict() == Verdict.COMMA) {
          return Optional.of(witness);
        }
        either =
            either.isEmpty() && witness.verdict() == Verdict.EITHER ? Optional.of(witness) : either;
      }
    }
    return either;
  }

  /** The numbers that a row of this role is read for. */
  private List<Fact> read(Role role, boolean isUnderstood) {
    return switch (role) {
      case SAMPLE, BLANK, CONTROL -> isUnderstood ? ofFlask : List.of();
      case DRIFT_CHECK -> ofCheck;
      case CALIBRATION -> ofCalibration;
    };
  }

  /** Most rows can be told at a glance to say nothing. */
  private boolean mayHoldMarks(Row row) {
    for (int column : columns) {
      if (row.cell(column) instanceof Cell.Text text && hasMark(text.text())) {
        return true;
      }
    }
    return inNames;
  }

  private static boolean hasMark(String text) {
    return text.indexOf('.') >= 0 || text.indexOf(',') >= 0;
  }

  private Witness witness(Fact fact, Given given, String text, Row row) {
    Position position = given.index() < 0 ? row.position() : row.at(given.index());
    if (!hasMark(text)
        || fact.kind() == Fact.Kind.SIGNAL && mapping.words().state(text).isPresent()) {
      return new Witness(Verdict.NOTHING, text, position, "");
    }
    Optional<Measured> byPoint = value(fact, given, point);
    Optional<Measured> byComma = value(fact, given, comma);
    return new Witness(
        verdict(byPoint, byComma),
        text.strip(),
        position,
        shown(byPoint) + " with a decimal point and " + shown(byComma) + " with a decimal comma");
  }

  private static Verdict verdict(Optional<Measured> byPoint, Optional<Measured> byComma) {
    if (byPoint.isPresent() && byComma.isPresent()) {
      return byPoint.equals(byComma) ? Verdict.NOTHING : Verdict.EITHER;
    }
    if (byPoint.isPresent()) {
      return Verdict.POINT;
    }
    return byComma.isPresent() ? Verdict.COMMA : Verdict.NOTHING;
  }

  /** By the first of the grammars that makes a number of it. */
  private Optional<Measured> value(Fact fact, Given given, List<NumberGrammar> grammars) {
    Optional<Measured> value = Optional.empty();
    for (int i = 0; i < grammars.size() && value.isEmpty(); i++) {
      value = value(fact, given, grammars.get(i));
    }
    return value;
  }

  private Optional<Measured> value(Fact fact, Given given, NumberGrammar grammar) {
    if (fact.kind() == Fact.Kind.SIGNAL) {
      OptionalDouble signal = grammar.parse(given.text());
      return signal.isPresent()
          ? Optional.of(Measured.exactly(new Quantity(signal.getAsDouble(), Unit.ONE)))
          : Optional.empty();
    }
    Notation notation = mapping.notation().with(grammar);
    Understood<Measured> read =
        fact.kind() == Fact.Kind.DILUTION
            ? new DilutionReader(notation).read(given.cell())
            : new AmountReader(notation).read(fact, given.cell(), given.form().unit());
    return read instanceof Understood.Value<Measured> value
        ? Optional.of(value.value())
        : Optional.empty();
  }

  private static String shown(Optional<Measured> value) {
    return value.map(Measured::toString).orElse("no number");
  }
}
