package org.spikewright.quantity;

import java.util.Collections;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;

/**
 * A unit of the laboratory's table.
 *
 * @param symbol the spelling we print, such as {@code µg/L}
 * @param dimension what it measures
 * @param perBase how many base units one of these is; base units are L, g, mol, g/L, g/g, mol/L,
 *     mol/g, V, g/mol and 1
 */
public record Unit(String symbol, Dimension dimension, double perBase) {

  /** The unit of a signal or any other plain number. */
  public static final Unit ONE = new Unit("1", Dimension.NUMBER, 1);

  private static final Map<String, Unit> TABLE = table();

  /**
   * Finds a unit by its spelling. Micro may be written µ, μ or u, litre L or l; blanks around the
   * stroke do not count. {@code ppm} and {@code ppb} are not units here: a mapping declares what
   * they mean.
   *
   * @return empty when the table has no such unit
   */
  public static Optional<Unit> find(String spelling) {
    Unit plain = TABLE.get(spelling);
    return plain != null ? Optional.of(plain) : Optional.ofNullable(TABLE.get(fold(spelling)));
  }

  /** Finds a unit that the program itself names; {@link IllegalArgumentException} when unknown. */
  public static Unit of(String spelling) {
    return find(spelling)
        .orElseThrow(() -> new IllegalArgumentException("no unit '" + spelling + "'"));
  }

  /** The spellings we print, in table order, for messages that list what is known. */
  public static List<String> symbols() {
    return TABLE.values().stream().map(Unit::symbol).distinct().toList();
  }

  /**
   * The factor that turns a number in this unit into a number in {@code other}; {@link
   * IllegalArgumentException} when the dimensions differ.
   */
  public double to(Unit other) {
    if (dimension != other.dimension) {
      throw new IllegalArgumentException(
          symbol
              + " is "
              + dimension.words()
              + ", "
              + other.symbol
              + " is "
              + other.dimension.words());
    }
    return perBase == other.perBase ? 1 : perBase / other.perBase;
  }

  @Override
  public String toString() {
    return symbol;
  }

  private static String fold(String spelling) {
    return spelling
        .strip()
        .replace('\u03bc', 'u')
        .replace('\u00b5', 'u')
        .replaceAll("\\s*/\\s*", "/")
        .replaceAll("(^|/|[munpkd])l$", "$1L")
        .replaceAll("l/", "L/");
  }

  private static Map<String, Unit> table() {
    Map<String, Unit> table = new LinkedHashMap<>();
    add(table, "1", Dimension.NUMBER, 1);
    add(table, "%", Dimension.NUMBER, 1e-2);
    String[] volumes = {"L", "dL", "mL", "µL", "nL"};
    double[] volumeSizes = {1, 1e-1, 1e-3, 1e-6, 1e-9};
    String[] masses = {"kg", "g", "mg", "µg", "ng", "pg"};
    double[] massSizes = {1e3, 1, 1e-3, 1e-6, 1e-9, 1e-12};
    String[] amounts = {"mol", "mmol", "µmol", "nmol", "pmol"};
    double[] amountSizes = {1, 1e-3, 1e-6, 1e-9, 1e-12};
    addAll(table, volumes, volumeSizes, Dimension.VOLUME);
    addAll(table, masses, massSizes, Dimension.MASS);
    addAll(table, amounts, amountSizes, Dimension.AMOUNT);
    ratios(table, masses, massSizes, volumes, volumeSizes, Dimension.MASS_PER_VOLUME);
    ratios(table, masses, massSizes, masses, massSizes, Dimension.MASS_PER_MASS);
    ratios(table, amounts, amountSizes, volumes, volumeSizes, Dimension.AMOUNT_PER_VOLUME);
    ratios(table, amounts, amountSizes, masses, massSizes, Dimension.AMOUNT_PER_MASS);
    String[] molars = {"M", "mM", "µM", "nM", "pM"};
    addAll(table, molars, amountSizes, Dimension.AMOUNT_PER_VOLUME);
    add(table, "V", Dimension.POTENTIAL, 1);
    add(table, "mV", Dimension.POTENTIAL, 1e-3);
    add(table, "g/mol", Dimension.MASS_PER_AMOUNT, 1);
    add(table, "kg/mol", Dimension.MASS_PER_AMOUNT, 1e3);
    return Collections.unmodifiableMap(table);
  }

  private static void addAll(
      Map<String, Unit> table, String[] symbols, double[] sizes, Dimension dimension) {
    for (int i = 0; i < symbols.length; i++) {
      add(table, symbols[i], dimension, sizes[i]);
    }
  }

  private static void ratios(
      Map<String, Unit> table,
      String[] tops,
      double[] topSizes,
      String[] bottoms,
      double[] bottomSizes,
      Dimension dimension) {
    for (int i = 0; i < tops.length; i++) {
      for (int j = 0; j < bottoms.length; j++) {
        add(table, tops[i] + "/" + bottoms[j], dimension, topSizes[i] / bottomSizes[j]);
      }
    }
  }

  private static void add(
      Map<String, Unit> table, String symbol, Dimension dimension, double size) {
    Unit unit = new Unit(symbol, dimension, size);
    table.put(symbol, unit);
    table.put(fold(symbol), unit);
  }
}
