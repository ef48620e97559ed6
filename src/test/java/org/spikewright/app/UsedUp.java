package org.spikewright.app;

import java.time.Duration;
import org.spikewright.schedule.Waker;

/** A daemon whose task uses up all memory: a process for a test. */
final class UsedUp {
  private UsedUp() {}

  public static void main(String[] args) throws InterruptedException {
    Main.endWhenBroken();
    Waker waker = new Waker(Duration.ofSeconds(1));
    waker.every(
        Duration.ofMillis(50),
        "use up memory",
        () -> {
          throw new OutOfMemoryError(args[0]);
        });
    Thread.sleep(8_000);
    waker.close();
  }
}
