package org.spikewright.app;

import java.time.Duration;
import java.time.Instant;
import java.util.ArrayList;
import java.util.List;
import org.spikewright.intake.Inbox;
import org.spikewright.intake.SettleRule;
import org.spikewright.ledger.Arrived;
import org.spikewright.workbook.WriteFault;

/** Takes in what lies in the watched folder and makes every summary that is owed. */
final class Once {
  /** How much longer than the settle time a file that keeps growing is waited for. */
  private static final Duration PATIENCE = Duration.ofSeconds(30);

  /**
   * What came of it.
   *
   * @param received deliveries
   * @param summaries issued
   * @param waiting files that wait for a person, and why
   * @param failing files that could not be taken in, and why
   * @param unsettled whether a file kept growing and was left
   * @param stopped whether it was told to stop before its end
   */
  record Report(
      List<Arrived> received,
      List<NightlySummary.Issued> summaries,
      List<String> waiting,
      List<String> failing,
      boolean unsettled,
      boolean stopped) {}

  private final Station station;
  private final Duration settle;
  private final Stop stop;

  Once(Station station, Duration settle, Stop stop) {
    this.station = station;
    this.settle = settle;
    this.stop = stop;
  }

  Report run() throws WriteFault, InterruptedException {
    Progress progress = Progress.onTerminal();
    Inbox inbox = new Inbox(station.settings().watch(), new SettleRule(settle));
    Round round =
        new Round(
            inbox,
            new Reception(station, stop, progress)::receive,
            new Filing(station, inbox),
            stop);
    Steady steady = new Steady(station.clock());
    Instant patience = steady.now().plus(settle).plus(PATIENCE);
    List<Arrived> received = new ArrayList<>();
    Round.Report last = round.run(steady.now());
    received.addAll(last.received());
    while (last.settling() && steady.now().isBefore(patience) && !stop.isRequested()) {
      Thread.sleep(Math.min(500, Math.max(50, settle.toMillis())));
      last = round.run(steady.now());
      received.addAll(last.received());
    }
    progress.done();
    List<NightlySummary.Issued> summaries =
        new NightlySummary(station, progress, stop).makeOwed(station.clock().instant(), true);
    return new Report(
        received, summaries, round.waiting(), round.failing(), last.settling(), stop.isRequested());
  }
}
