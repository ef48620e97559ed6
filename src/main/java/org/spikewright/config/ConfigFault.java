package org.spikewright.config;

import java.util.Optional;

/**
 * One thing that is wrong with a configuration file.
 *
 * @param file the file as a person knows it
 * @param line counted from 1
 * @param column counted from 1
 * @param found what stands there
 * @param expected what should stand there
 * @param nearestKey the known key, group or name that was probably meant
 */
public record ConfigFault(
    String file, int line, int column, String found, String expected, Optional<String> nearestKey) {

  @Override
  public String toString() {
    return file
        + " line "
        + line
        + ", column "
        + column
        + ": found "
        + found
        + "; expected "
        + expected
        + nearestKey.map(key -> "; did you mean " + key + "?").orElse("");
  }
}
