package org.spikewright.app;

import java.time.Duration;
import java.time.Instant;
import java.time.LocalDate;
import java.time.LocalDateTime;
import java.time.LocalTime;
import java.time.ZoneId;
import java.util.concurrent.CountDownLatch;
import java.util.concurrent.TimeUnit;
import org.slf4j.Logger;
import org.slf4j.LoggerFactory;
import org.spikewright.config.Settings;
import org.spikewright.intake.Inbox;
import org.spikewright.intake.SettleRule;
import org.spikewright.schedule.Waker;
import org.spikewright.workbook.WriteFault;

/** Looks into the watched folder and makes the nightly summaries until it is told to stop. */
final class Daemon {
  private static final Logger LOG = LoggerFactory.getLogger(Daemon.class);

  /** Within this the daemon is down after it was told to stop. */
  private static final Duration PATIENCE = Duration.ofSeconds(8);

  /** How a process ends that was told to. */
  private static final int STOPPED = 143;

  private static final Duration SUMMARY_CHECK = Duration.ofSeconds(20);

  private final Station station;
  private final Stop stop = new Stop();
  private final CountDownLatch ended = new CountDownLatch(1);
  private final Standing standing = new Standing(LOG);
  private final Round round;
  private final NightlySummary summary;
  private final Steady steady;
  private final Duration summaryCheck;

  Daemon(Station station) {
    this(station, SUMMARY_CHECK);
  }

  /**
   * A daemon.
   *
   * @param summaryCheck how often it asks whether a summary is due
   */
  Daemon(Station station, Duration summaryCheck) {
    this.station = station;
    this.summaryCheck = summaryCheck;
    Settings settings = station.settings();
    Inbox inbox = new Inbox(settings.watch(), new SettleRule(settings.settle()));
    this.round =
        new Round(
            inbox,
            new Reception(station, stop, Progress.none())::receive,
            new Filing(station, inbox),
            stop);
    this.summary = new NightlySummary(station, Progress.none(), stop);
    this.steady = new Steady(station.clock());
  }

  /** Runs until the process is told to end, and returns when everything is closed. */
  void run() throws InterruptedException {
    Runtime.getRuntime().addShutdownHook(new Thread(this::end, "stop"));
    try {
      work();
    } finally {
      ended.countDown();
    }
  }

  private void work() throws InterruptedException {
    Waker waker = new Waker(PATIENCE);
    LOG.info("watching folder={} every={} s", station.settings().watch(), seconds());
    waker.every(station.settings().lookEvery(), "look into the watched folder", this::look);
    waker.every(summaryCheck, "make summaries that are due", this::summarise);
    while (!stop.isRequested()) {
      Thread.sleep(100);
    }
    if (!waker.stop(PATIENCE)) {
      // Closing the ledger under a running task is no clean end either; the system frees the lock.
      LOG.warn("did not stop in time; what was under way is forgotten at the next start");
      Runtime.getRuntime().halt(STOPPED);
    }
    station.close();
    LOG.info("stopped");
  }

  /** Asks it to end; {@link #run} returns soon after. */
  void stop() {
    stop.request();
  }

  private String seconds() {
    return String.valueOf(station.settings().lookEvery().toMillis() / 1000.0);
  }

  private void look() {
    round.run(steady.now());
  }

  private void summarise() {
    Settings settings = station.settings();
    Instant due = latest(station.clock().instant(), settings.nightly(), settings.calendar().zone());
    try {
      summary.makeOwed(due, false);
      standing.over("summary");
    } catch (WriteFault trouble) {
      standing.trouble(
          "summary",
          "the summary cannot be written and will be tried again: " + trouble.getMessage());
    }
  }

  /** The latest nightly time that has come; one that a clock change skips comes after the gap. */
  static Instant latest(Instant now, LocalTime nightly, ZoneId zone) {
    LocalDate today = now.atZone(zone).toLocalDate();
    Instant time = LocalDateTime.of(today, nightly).atZone(zone).toInstant();
    return time.isAfter(now)
        ? LocalDateTime.of(today.minusDays(1), nightly).atZone(zone).toInstant()
        : time;
  }

  /** The process is told to end: waits until the current file is finished or given up. */
  private void end() {
    stop.request();
    try {
      if (!ended.await(PATIENCE.toMillis() + 1000, TimeUnit.MILLISECONDS)) {
        LOG.warn("the end takes too long and is cut short; nothing that is recorded is lost");
      }
    } catch (InterruptedException interrupted) {
      Thread.currentThread().interrupt();
    }
  }
}
