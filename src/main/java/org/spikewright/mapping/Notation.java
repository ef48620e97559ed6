package org.spikewright.mapping;

import java.util.Locale;
import java.util.Map;
import java.util.Optional;
import org.spikewright.quantity.NumberGrammar;
import org.spikewright.quantity.Unit;

/**
 * How numbers, units and ratios are written.
 *
 * @param numbers the grammar of numbers in text
 * @param declared what {@code ppm}, {@code ppb} and {@code ppt} mean, where the mapping says so
 * @param ratio what {@code 1:10} means, where the mapping says so
 */
public record Notation(NumberGrammar numbers, Map<String, Unit> declared, Optional<Ratio> ratio) {

  /** Decimal point; nothing is declared. */
  public static final Notation PLAIN =
      new Notation(NumberGrammar.POINT, Map.of(), Optional.empty());

  /** What a ratio means in a dilution. */
  public enum Ratio {
    /** 1:10 is 1 part made up to 10: a factor of 10. */
    PART_IN_TOTAL("part in total"),
    /** 1:10 is 1 part and 10 parts: a factor of 11. */
    PART_PLUS_PART("part plus part");

    private final String word;

    Ratio(String word) {
      this.word = word;
    }

    /** The words used in mappings. */
    public String word() {
      return word;
    }
  }

  /** Finds a unit by its spelling, {@code ppm} and its like only where they are declared. */
  public Optional<Unit> unit(String spelling) {
    Unit own = declared.get(spelling.strip().toLowerCase(Locale.ROOT));
    return own != null ? Optional.of(own) : Unit.find(spelling);
  }

  /** The same with another grammar of numbers. */
  public Notation with(NumberGrammar other) {
    return new Notation(other, declared, ratio);
  }
}
