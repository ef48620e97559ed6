package org.spikewright.schedule;

import static java.util.concurrent.TimeUnit.MILLISECONDS;
import static java.util.concurrent.TimeUnit.SECONDS;
import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.assertThatThrownBy;
import static org.awaitility.Awaitility.await;

import ch.qos.logback.classic.Logger;
import ch.qos.logback.classic.spi.ILoggingEvent;
import ch.qos.logback.core.read.ListAppender;
import java.time.Duration;
import java.util.Date;
import java.util.Iterator;
import java.util.List;
import java.util.concurrent.CountDownLatch;
import java.util.concurrent.atomic.AtomicBoolean;
import java.util.concurrent.atomic.AtomicInteger;
import java.util.concurrent.atomic.AtomicReference;
import org.junit.jupiter.api.AfterEach;
import org.junit.jupiter.api.BeforeEach;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.Timeout;
import org.quartz.SimpleScheduleBuilder;
import org.quartz.TriggerBuilder;
import org.quartz.TriggerKey;
import org.slf4j.LoggerFactory;

@Timeout(30)
class WakerTest {
  private static final Duration PATIENCE = Duration.ofSeconds(5);

  private final ListAppender<ILoggingEvent> log = new ListAppender<>();
  private final Logger logger =
      (Logger) LoggerFactory.getLogger(Waker.class.getPackage().getName());

  @BeforeEach
  void listen() {
    logger.setAdditive(false);
    log.start();
    logger.addAppender(log);
  }

  @AfterEach
  void stopListening() {
    logger.detachAppender(log);
    logger.setAdditive(true);
  }

  private List<String> said() {
    return List.copyOf(log.list).stream().map(ILoggingEvent::getFormattedMessage).toList();
  }

  @Test
  void aTaskIsWokenAtOnceAndThenAgain() throws Exception {
    CountDownLatch first = new CountDownLatch(1);
    CountDownLatch fifth = new CountDownLatch(5);
    try (Waker waker = new Waker(PATIENCE)) {
      waker.every(Duration.ofMinutes(10), "first", first::countDown);
      assertThat(first.await(5, SECONDS)).isTrue();
      waker.every(Duration.ofMillis(50), "again", fifth::countDown);
      assertThat(fifth.await(10, SECONDS)).isTrue();
    }
  }

  @Test
  void noTwoTasksRunAtATimeAndMissedWakeUpsMerge() throws Exception {
    AtomicInteger running = new AtomicInteger();
    AtomicBoolean overlap = new AtomicBoolean();
    AtomicInteger slow = new AtomicInteger();
    AtomicInteger quick = new AtomicInteger();
    CountDownLatch release = new CountDownLatch(1);
    try (Waker waker = new Waker(PATIENCE)) {
      waker.every(
          Duration.ofMillis(500),
          "slow",
          () -> {
            overlap.compareAndSet(false, running.incrementAndGet() > 1);
            if (slow.incrementAndGet() == 1) {
              pause(release);
            }
            running.decrementAndGet();
          });
      await().until(() -> slow.get() == 1);
      waker.every(
          Duration.ofMillis(500),
          "quick",
          () -> {
            overlap.compareAndSet(false, running.incrementAndGet() > 1);
            quick.incrementAndGet();
            running.decrementAndGet();
          });
      // Three wake-ups of each fall due meanwhile.
      MILLISECONDS.sleep(1800);
      assertThat(quick).hasValue(0);
      release.countDown();
      await().until(() -> quick.get() >= 1 && slow.get() >= 2);
      MILLISECONDS.sleep(100);
      assertThat(quick.get()).isLessThanOrEqualTo(2);
      assertThat(slow.get()).isLessThanOrEqualTo(3);
    }
    assertThat(overlap).isFalse();
  }

  @Test
  void aTaskThatThrowsIsLoggedOnceWithTheConsequenceAndWokenAgain() {
    AtomicInteger tries = new AtomicInteger();
    try (Waker waker = new Waker(PATIENCE)) {
      waker.every(
          Duration.ofMillis(200),
          "look into the inbox",
          () -> {
            int number = tries.incrementAndGet();
            if (number <= 3) {
              throw new IllegalStateException("share gone");
            }
            if (number == 4) {
              throw new AssertionError("worse");
            }
          });
      await().until(() -> tries.get() >= 6);
    }
    assertThat(said())
        .containsExactly(
            "'look into the inbox' failed: java.lang.IllegalStateException: share gone;"
                + " will try again in 200 ms",
            "'look into the inbox' failed: java.lang.AssertionError: worse;"
                + " will try again in 200 ms",
            "'look into the inbox' works again after 4 failed tries");
  }

  @Test
  void anErrorOfTheMachineGoesToTheHandlerOfUncaughtExceptions() {
    AtomicReference<Throwable> handled = new AtomicReference<>();
    AtomicInteger tries = new AtomicInteger();
    try (Waker waker = new Waker(PATIENCE)) {
      waker.every(
          Duration.ofMillis(100),
          "eat memory",
          () -> {
            if (tries.incrementAndGet() == 1) {
              Thread.currentThread()
                  .setUncaughtExceptionHandler((here, error) -> handled.set(error));
              throw new OutOfMemoryError("as a test");
            }
          });
      await().until(() -> tries.get() >= 2);
    }
    assertThat(handled.get()).isInstanceOf(OutOfMemoryError.class);
    assertThat(said().get(0)).contains("not to be trusted");
  }

  @Test
  void closingWaitsForTheRunningTaskAndWakesNothingAfterwards() throws Exception {
    AtomicInteger ended = new AtomicInteger();
    CountDownLatch started = new CountDownLatch(1);
    Waker waker = new Waker(PATIENCE);
    waker.every(
        Duration.ofMillis(50),
        "work",
        () -> {
          started.countDown();
          sleep(300);
          ended.incrementAndGet();
        });
    started.await();
    waker.close();
    int count = ended.get();
    assertThat(count).isEqualTo(1);
    MILLISECONDS.sleep(300);
    assertThat(ended).hasValue(count);
    assertThat(waker.stop(Duration.ZERO)).isTrue();
  }

  @Test
  void closingGivesUpOnATaskThatDoesNotEnd() throws Exception {
    CountDownLatch started = new CountDownLatch(1);
    CountDownLatch release = new CountDownLatch(1);
    Waker waker = new Waker(Duration.ofMillis(200));
    waker.every(
        Duration.ofMinutes(1),
        "work",
        () -> {
          started.countDown();
          pause(release);
        });
    started.await();
    waker.close();
    assertThat(said()).hasSize(1).first().asString().contains("still runs");
    release.countDown();
    assertThat(waker.stop(PATIENCE)).isTrue();
  }

  @Test
  void aTaskMayStopItsOwnWakerWithoutWaitingForItself() {
    Waker waker = new Waker(PATIENCE);
    AtomicReference<Boolean> ended = new AtomicReference<>();
    waker.every(Duration.ofMillis(50), "stop", () -> ended.set(waker.stop(Duration.ofMinutes(1))));
    await().until(() -> ended.get() != null);
    assertThat(ended.get()).isFalse();
    assertThat(waker.stop(PATIENCE)).isTrue();
  }

  @Test
  void aClockSetBackDoesNotStopTheWakeUps() throws Exception {
    AtomicInteger turns = new AtomicInteger();
    try (Waker waker = new Waker(PATIENCE)) {
      waker.every(Duration.ofMillis(100), "look", turns::incrementAndGet);
      await().until(() -> turns.get() >= 2);
      // What a clock set back by a day looks like from here: the next wake-up is a day away.
      waker
          .scheduler()
          .rescheduleJob(
              TriggerKey.triggerKey("look"),
              TriggerBuilder.newTrigger()
                  .withIdentity("look")
                  .startAt(new Date(System.currentTimeMillis() + 86_400_000L))
                  .withSchedule(SimpleScheduleBuilder.repeatSecondlyForever())
                  .build());
      int before = turns.get();
      await().atMost(10, SECONDS).until(() -> turns.get() >= before + 3);
    }
    assertThat(said()).anyMatch(line -> line.contains("was the clock set back?"));
  }

  @Test
  void onlyDaemonThreadsAreStarted() throws Exception {
    CountDownLatch done = new CountDownLatch(1);
    try (Waker waker = new Waker(PATIENCE)) {
      waker.every(Duration.ofMinutes(1), "look", done::countDown);
      assertThat(done.await(5, SECONDS)).isTrue();
      Iterator<Thread> threads = Thread.getAllStackTraces().keySet().iterator();
      int seen = 0;
      while (threads.hasNext()) {
        Thread thread = threads.next();
        if (thread.getName().startsWith("spikewright-")
            || thread.getName().startsWith("watch over")) {
          assertThat(thread.isDaemon()).as(thread.getName()).isTrue();
          seen++;
        }
      }
      assertThat(seen).isGreaterThanOrEqualTo(3);
    }
  }

  @Test
  void twoTasksOfOneNameAreABrokenPromise() {
    try (Waker waker = new Waker(PATIENCE)) {
      waker.every(Duration.ofMinutes(1), "look", () -> {});
      assertThatThrownBy(() -> waker.every(Duration.ofMinutes(1), "look", () -> {}))
          .isInstanceOf(IllegalStateException.class)
          .hasMessageContaining("'look'");
    }
  }

  private static void pause(CountDownLatch latch) {
    try {
      latch.await();
    } catch (InterruptedException interrupted) {
      Thread.currentThread().interrupt();
    }
  }

  private static void sleep(long millis) {
    try {
      MILLISECONDS.sleep(millis);
    } catch (InterruptedException interrupted) {
      Thread.currentThread().interrupt();
    }
  }
}
