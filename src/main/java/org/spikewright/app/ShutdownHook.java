package org.spikewright.app;

import java.util.concurrent.CountDownLatch;
import java.util.concurrent.TimeUnit;

/** Lets a command that is told to end give up its current file before the process is gone. */
final class ShutdownHook {
  private static final long PATIENCE_SECONDS = 9;

  private final CountDownLatch over = new CountDownLatch(1);

  private ShutdownHook() {}

  static ShutdownHook of(Stop stop) {
    ShutdownHook hook = new ShutdownHook();
    Runtime.getRuntime().addShutdownHook(new Thread(() -> hook.end(stop), "stop"));
    return hook;
  }

  private void end(Stop stop) {
    stop.request();
    try {
      over.await(PATIENCE_SECONDS, TimeUnit.SECONDS);
    } catch (InterruptedException interrupted) {
      Thread.currentThread().interrupt();
    }
  }

  /** Everything is closed. */
  void over() {
    over.countDown();
  }
}
