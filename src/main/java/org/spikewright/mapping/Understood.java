package org.spikewright.mapping;

import java.util.function.Function;

/**
 * What came of reading a cell or a text.
 *
 * @param <T> what was looked for
 */
public sealed interface Understood<T> {

  /** It was understood. */
  record Value<T>(T value) implements Understood<T> {}

  /**
   * It was not.
   *
   * @param reason why, in short
   * @param found what stood there
   * @param expected what should have stood there
   */
  record Nothing<T>(Rejection.Reason reason, String found, String expected)
      implements Understood<T> {}

  /** Goes on with the value, or keeps the reason why there is none. */
  default <R> Understood<R> then(Function<T, Understood<R>> next) {
    if (this instanceof Value<T> value) {
      return next.apply(value.value());
    }
    Nothing<T> nothing = (Nothing<T>) this;
    return new Nothing<>(nothing.reason(), nothing.found(), nothing.expected());
  }
}
