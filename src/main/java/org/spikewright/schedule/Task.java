package org.spikewright.schedule;

import java.time.Duration;
import java.util.Optional;
import java.util.concurrent.atomic.AtomicLong;
import org.slf4j.Logger;
import org.slf4j.LoggerFactory;

/** Something to do again and again, whose failures end nothing. */
final class Task {
  private static final Logger LOG = LoggerFactory.getLogger(Task.class);

  private final String what;
  private final Duration interval;
  private final Runnable body;
  private final AtomicLong turns = new AtomicLong();

  /** What it failed with the last time; empty when it did not. */
  private Optional<String> failure = Optional.empty();

  private long failures;

  Task(String what, Duration interval, Runnable body) {
    this.what = what;
    this.interval = interval;
    this.body = body;
  }

  String what() {
    return what;
  }

  Duration interval() {
    return interval;
  }

  /** How many turns it was given. */
  long turns() {
    return turns.get();
  }

  /**
   * Does it once. A failure is logged with its consequence, and once while it stays the same. After
   * an error of the virtual machine, such as memory used up, nothing in the program is to be
   * trusted: it goes to the thread's handler of uncaught exceptions, whose choice it is to halt.
   */
  void run() {
    turns.incrementAndGet();
    try {
      body.run();
      succeeded();
    } catch (VirtualMachineError fatal) {
      LOG.error("'{}' failed: {}; the program is not to be trusted after this", what, fatal, fatal);
      Thread here = Thread.currentThread();
      here.getUncaughtExceptionHandler().uncaughtException(here, fatal);
    } catch (RuntimeException | Error fault) {
      failed(fault);
    }
  }

  private void succeeded() {
    if (failure.isPresent()) {
      LOG.warn("'{}' works again after {} failed tries", what, failures);
      failure = Optional.empty();
      failures = 0;
    }
  }

  private void failed(Throwable fault) {
    failures++;
    if (!failure.equals(Optional.of(fault.toString()))) {
      failure = Optional.of(fault.toString());
      LOG.error("'{}' failed: {}; will try again in {}", what, fault, shown(), fault);
    }
  }

  /** The interval as a person says it. */
  private String shown() {
    return interval.toMillis() % 1000 == 0
        ? interval.toSeconds() + " s"
        : interval.toMillis() + " ms";
  }
}
