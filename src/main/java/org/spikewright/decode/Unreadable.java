package org.spikewright.decode;

import org.spikewright.table.DecodeFault;

/** Carries a fault from where it is found, through the libraries, to {@link FileDecoder}. */
final class Unreadable extends RuntimeException {
  private static final long serialVersionUID = 1L;

  private final transient DecodeFault fault;

  Unreadable(String place, String found, String expected, String advice) {
    super(place + ": " + found, null, false, false);
    this.fault = new DecodeFault(place, found, expected, advice);
  }

  DecodeFault fault() {
    return fault;
  }
}
