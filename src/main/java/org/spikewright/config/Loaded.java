package org.spikewright.config;

import java.nio.file.Path;
import java.util.List;

/**
 * What came of reading a configuration file.
 *
 * @param <T> what it holds
 */
public sealed interface Loaded<T> {

  /** It is in order. */
  record Good<T>(T value) implements Loaded<T> {}

  /**
   * It is not.
   *
   * @param file the file
   * @param faults all of them, in the order of the file; at least one
   */
  record Faulty<T>(Path file, List<ConfigFault> faults) implements Loaded<T> {
    /** Copies the list. */
    public Faulty {
      faults = List.copyOf(faults);
    }
  }
}
