package org.spikewright.mapping;

/** How the header is found below a preamble. */
public sealed interface HeaderRule {
  /** The first row that holds every mapped header. */
  record AllHeaders() implements HeaderRule {}

  /** The first row that holds this cell. */
  record HoldsCell(String words) implements HeaderRule {}

  /** The row with this number, as a person counts. */
  record AtRow(long number) implements HeaderRule {}
}
