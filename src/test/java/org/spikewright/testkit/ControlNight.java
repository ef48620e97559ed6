package org.spikewright.testkit;

import java.util.ArrayList;
import java.util.HashMap;
import java.util.List;
import java.util.Map;
import java.util.OptionalDouble;
import java.util.Random;
import org.spikewright.analysis.ControlHistory;
import org.spikewright.analysis.ControlKey;
import org.spikewright.analysis.ControlPoint;
import org.spikewright.analysis.ControlRule.Certified;
import org.spikewright.analysis.ControlRule.Kind;
import org.spikewright.analysis.ControlRule.Limits;
import org.spikewright.analysis.Evidence;
import org.spikewright.mapping.PerAnalyte;
import org.spikewright.quantity.Quantity;
import org.spikewright.reading.BatchReading;
import org.spikewright.reading.Role;
import org.spikewright.testkit.ControlBench.Sample;

/** A night with a control of every kind, some of them out. */
public final class ControlNight {
  private ControlNight() {}

  /** What its series say about each other. */
  public static Evidence evidence() {
    PerAnalyte<Certified> added =
        PerAnalyte.one(
            new Certified(new Quantity(5, ControlBench.MG_PER_L), OptionalDouble.empty()));
    List<BatchReading> beside = new ArrayList<>();
    for (int i = 0; i < 5; i++) {
      beside.add(ControlBench.check("CCV", -30 + 40L * i, 1 - 0.03 * i));
      beside.add(ControlBench.calibration(i, 0.001 + 1.82 * i + 0.004 * (i % 2)));
    }
    return ControlBench.evidence(
        List.of(
            ControlBench.rule("QC low", Kind.CONTROL_SAMPLE, 2, 0.05, Limits.NONE),
            ControlBench.rule("QC high", Kind.CONTROL_SAMPLE, 10, 0.1, Limits.NONE),
            ControlBench.beside("-SP", Kind.SPIKED_CONTROL, added),
            ControlBench.beside("-D", Kind.DUPLICATE, PerAnalyte.none())),
        List.of(
            Sample.of("QC low", 2.02).series(),
            Sample.of("QC high", 12.6).series(),
            Sample.of("W-1", 8).series(),
            Sample.of("W-1", 8.9).dilution(2).at(20).series(),
            Sample.of("W-1-SP", 12.9).series(),
            Sample.of("W-1-D", 10.1).series(),
            Sample.of("W-2", 6).line("228.8").series(),
            Sample.of("W-2", 6.2).line("214.4").series(),
            Sample.of("Reagents", 0.3).role(Role.BLANK).series()),
        beside,
        history());
  }

  private static ControlHistory history() {
    Random random = new Random(7);
    Map<ControlKey, List<ControlPoint>> points = new HashMap<>();
    points.putAll(past("QC high", Kind.CONTROL_SAMPLE, random, 10.1, 0.2, 24));
    points.putAll(past("QC low", Kind.CONTROL_SAMPLE, random, 2, 0.05, 6));
    points.putAll(past("Reagents", Kind.BLANK, random, 0.2, 0.03, 21));
    return new ControlHistory(points);
  }

  private static Map<ControlKey, List<ControlPoint>> past(
      String name, Kind kind, Random random, double mean, double sd, int n) {
    double[] values = new double[n];
    for (int i = 0; i < n; i++) {
      values[i] = mean + sd * random.nextGaussian();
    }
    return ControlBench.history(new ControlKey(name, kind, "furnace", "Cd", ""), values).points();
  }
}
