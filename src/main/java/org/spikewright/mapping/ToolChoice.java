package org.spikewright.mapping;

import java.text.Normalizer;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.Comparator;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import org.spikewright.mapping.Rejection.Reason;
import org.spikewright.quantity.Quantity;
import org.spikewright.reading.Tool;

/**
 * Finds the glassware that a quantity was measured with, by name: {@code "P200"}, or several that
 * share the work, {@code "P200, P1000"}.
 */
public final class ToolChoice {
  private final Map<String, Tool> glassware;

  /** Chooses among what has a name. */
  public ToolChoice(Map<String, Tool> glassware) {
    this.glassware = glassware;
  }

  /** The names in a text, in order. */
  public static List<String> names(String text) {
    return Arrays.stream(text.split(",", -1)).map(ToolChoice::normal).toList();
  }

  /** A name as the table holds it: trimmed and in NFC. */
  public static String normal(String name) {
    return Normalizer.normalize(name.strip(), Normalizer.Form.NFC);
  }

  /** One piece of glassware by its name. */
  public Understood<Tool> named(String name) {
    Tool tool = glassware.get(normal(name));
    return tool == null
        ? new Understood.Nothing<>(
            Reason.NAME_UNKNOWN, name.strip(), expected("glassware", name, glassware))
        : new Understood.Value<>(tool);
  }

  /** What to say where a name is not in a table: what should stand there, and what is nearest. */
  static String expected(String what, String name, Map<String, ?> table) {
    return "a name in the table of "
        + what
        + (table.isEmpty() ? ", which is empty" : "")
        + Spelling.nearest(normal(name), table.keySet())
            .map(near -> "; did you mean '" + near + "'?")
            .orElse("");
  }

  /**
   * The glassware that a quantity was measured with: the first named whose good range holds it;
   * else, of those that can measure it at all, the one with the fewest strokes.
   */
  public Understood<Tool> of(String text, Quantity quantity) {
    List<Tool> tools = new ArrayList<>();
    for (String name : names(text)) {
      if (!(named(name) instanceof Understood.Value<Tool> tool)) {
        return named(name);
      }
      tools.add(tool.value());
    }
    Optional<Tool> first = tools.stream().filter(tool -> tool.holds(quantity)).findFirst();
    if (first.isPresent()) {
      return new Understood.Value<>(first.get());
    }
    return tools.stream()
        .filter(tool -> tool.refusal(quantity).isEmpty())
        .min(
            Comparator.<Tool>comparingDouble(tool -> tool.strokes(quantity))
                .thenComparingDouble(tool -> tool.highest().value() * tool.unit().perBase()))
        .<Understood<Tool>>map(Understood.Value::new)
        .orElseGet(() -> refused(text, quantity, tools));
  }

  private static Understood<Tool> refused(String text, Quantity quantity, List<Tool> tools) {
    List<String> instead =
        tools.stream()
            .map(tool -> tool.refusal(quantity).orElseThrow() + " by '" + tool.name() + "'")
            .toList();
    boolean unlike =
        tools.stream().noneMatch(tool -> tool.unit().dimension() == quantity.unit().dimension());
    return new Understood.Nothing<>(
        unlike ? Reason.UNIT_DOES_NOT_FIT : Reason.OUT_OF_BOUNDS,
        quantity + " by " + text.strip(),
        String.join(", or ", instead));
  }
}
