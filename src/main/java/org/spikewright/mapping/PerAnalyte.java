package org.spikewright.mapping;

import java.util.Map;
import java.util.Optional;
import java.util.stream.Stream;

/**
 * Something a mapping says once for all analytes, or for each.
 *
 * @param all for every analyte that is not named
 * @param each by analyte
 * @param <T> what is said
 */
public record PerAnalyte<T>(Optional<T> all, Map<String, T> each) {

  /** Copies the map. */
  public PerAnalyte {
    each = Map.copyOf(each);
  }

  /** Nothing is said. */
  public static <T> PerAnalyte<T> none() {
    return new PerAnalyte<>(Optional.empty(), Map.of());
  }

  /** One for all. */
  public static <T> PerAnalyte<T> one(T value) {
    return new PerAnalyte<>(Optional.of(value), Map.of());
  }

  /** What is said for an analyte. */
  public Optional<T> of(String analyte) {
    T own = each.get(analyte);
    return own == null ? all : Optional.of(own);
  }

  /** Whether nothing is said. */
  public boolean isEmpty() {
    return all.isEmpty() && each.isEmpty();
  }

  /** All that is said. */
  public Stream<T> values() {
    return Stream.concat(all.stream(), each.values().stream());
  }
}
