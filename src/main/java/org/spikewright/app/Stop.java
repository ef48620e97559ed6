package org.spikewright.app;

/** The wish to stop, which long work looks at between two rows. */
final class Stop {
  private volatile boolean requested;

  void request() {
    requested = true;
  }

  boolean isRequested() {
    return requested;
  }
}
