package org.spikewright.config;

import org.tomlj.TomlPosition;

/** A place in a configuration file, counted from 1. */
record At(int line, int column) implements Comparable<At> {
  static final At START = new At(1, 1);

  static At of(TomlPosition position) {
    return position == null ? START : new At(position.line(), position.column());
  }

  @Override
  public int compareTo(At other) {
    return line == other.line
        ? Integer.compare(column, other.column)
        : Integer.compare(line, other.line);
  }
}
