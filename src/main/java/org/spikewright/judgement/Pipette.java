package org.spikewright.judgement;

import java.util.Optional;
import org.spikewright.quantity.Dimension;
import org.spikewright.quantity.Numbers;
import org.spikewright.quantity.Quantity;
import org.spikewright.quantity.QuantityText;
import org.spikewright.quantity.Unit;

/**
 * A pipette and the volumes that it delivers well.
 *
 * @param name as the bench calls it; its range where it has none
 * @param lowest volume in µL, above 0
 * @param highest volume in µL, at least {@code lowest}
 * @param increment in µL: volumes are whole multiples of it; above 0
 */
public record Pipette(String name, double lowest, double highest, double increment) {

  /** What {@link #parse} reads, for messages. */
  public static final String EXPECTED =
      "a range such as \"10 µL to 100 µL\", or \"10 µL to 100 µL by 0.5 µL\"";

  private static final Unit MICROLITRE = Unit.of("µL");

  /** Three digits on the dial. */
  private static final double STEPS = 1000;

  /** Refuses what is no range: {@link IllegalArgumentException}. */
  public Pipette {
    boolean isRange = lowest > 0 && highest >= lowest && highest <= Double.MAX_VALUE;
    if (!(isRange && increment > 0 && increment <= highest)) {
      throw new IllegalArgumentException(lowest + " to " + highest + " by " + increment + " µL");
    }
  }

  /**
   * Reads {@code 10 µL to 100 µL} or {@code 10 µL to 100 µL by 0.5 µL}; without "by" the increment
   * is a thousandth of the highest volume.
   *
   * @return empty when the text is no such range
   */
  public static Optional<Pipette> parse(String text) {
    String[] parts = text.strip().split(" to | by ", -1);
    boolean by = text.contains(" by ");
    if (parts.length != (by ? 3 : 2) || by && text.indexOf(" by ") < text.indexOf(" to ")) {
      return Optional.empty();
    }
    double[] volumes = new double[3];
    for (int i = 0; i < parts.length; i++) {
      Optional<Quantity> volume = QuantityText.parse(parts[i], Dimension.VOLUME);
      if (volume.isEmpty()) {
        return Optional.empty();
      }
      volumes[i] = Deliveries.tidy(volume.get().in(MICROLITRE));
    }
    double increment = by ? volumes[2] : Deliveries.tidy(volumes[1] / STEPS);
    boolean isRange = volumes[0] > 0 && volumes[1] >= volumes[0];
    return isRange && increment > 0 && increment <= volumes[1]
        ? Optional.of(new Pipette(text.strip(), volumes[0], volumes[1], increment))
        : Optional.empty();
  }

  /** Whether it delivers this volume, in µL: inside its range and on its dial. */
  boolean delivers(double volume) {
    double steps = volume / increment;
    boolean onDial = Math.abs(steps - Math.rint(steps)) <= 1e-6 * Math.max(1, steps);
    boolean inside = volume >= lowest * (1 - 1e-9) && volume <= highest * (1 + 1e-9);
    return onDial && inside;
  }

  @Override
  public String toString() {
    String range = Numbers.plain(lowest) + " µL to " + Numbers.plain(highest) + " µL";
    return name.isEmpty() ? range : name;
  }
}
