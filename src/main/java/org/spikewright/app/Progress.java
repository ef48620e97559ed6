package org.spikewright.app;

import java.io.PrintStream;
import java.util.Locale;

/** Progress of long work on a terminal; says nothing anywhere else. */
final class Progress {
  private static final int WIDTH = 60;
  private static final long EVERY_NANOS = 200_000_000L;

  private final PrintStream out;
  private final boolean terminal;
  private long last = System.nanoTime();
  private boolean shown;

  Progress(PrintStream out, boolean terminal) {
    this.out = out;
    this.terminal = terminal;
  }

  /** Progress for whoever sits at the terminal, if somebody does. */
  static Progress onTerminal() {
    return new Progress(System.err, System.console() != null);
  }

  /** Silence. */
  static Progress none() {
    return new Progress(System.err, false);
  }

  /** Shows how far the work has come, a few times a second. */
  void at(String what, long count) {
    if (terminal && System.nanoTime() - last > EVERY_NANOS) {
      last = System.nanoTime();
      shown = true;
      String line = String.format(Locale.ROOT, "%s %,d", what, count);
      out.print("\r" + line + " ".repeat(Math.max(0, WIDTH - line.length())));
      out.flush();
    }
  }

  /** Clears the line, so that other output can follow. */
  void done() {
    if (shown) {
      out.print("\r" + " ".repeat(WIDTH) + "\r");
      out.flush();
      shown = false;
    }
  }
}
