package org.spikewright.judgement;

import static org.assertj.core.api.Assertions.assertThat;

import java.time.Duration;
import java.time.Instant;
import java.util.ArrayList;
import java.util.List;
import java.util.Random;
import java.util.function.DoubleFunction;
import org.junit.jupiter.api.Test;
import org.spikewright.fit.NativeEstimate;
import org.spikewright.fit.QuadraticFit;
import org.spikewright.fit.StraightLine;
import org.spikewright.fit.StraightRange;
import org.spikewright.judgement.RepeatAdvice.Again;
import org.spikewright.judgement.RepeatAdvice.NoPlan;
import org.spikewright.judgement.RepeatAdvice.Nothing;
import org.spikewright.judgement.RepeatAdvice.SomeFlasks;
import org.spikewright.judgement.RepeatPlan.Portion;
import org.spikewright.reading.FlaskFacts;
import org.spikewright.reading.Recorded;
import org.spikewright.series.Gathering;
import org.spikewright.series.GatheringRules;
import org.spikewright.testkit.Bench;
import org.spikewright.testkit.Nights;
import org.spikewright.testkit.Nights.Shape;

class RepeatAdviceTest {
  private static final CriteriaBook BOOK = CriteriaBook.defaults();

  private static RepeatAdvice advice(Outcome outcome) {
    return RepeatAdvice.of(outcome, BOOK);
  }

  private static Again again(Outcome outcome) {
    RepeatAdvice advice = advice(outcome);
    assertThat(advice).as(outcome.flags() + "\n" + advice).isInstanceOf(Again.class);
    return (Again) advice;
  }

  /** A series of the bench: additions in mL or mg/L, and its signals. */
  private static Outcome series(
      DoubleFunction<FlaskFacts> facts, double[] additions, double[] signals) {
    List<Recorded> readings = new ArrayList<>();
    for (int i = 0; i < additions.length; i++) {
      readings.add(
          new Recorded(
              Bench.reading(facts.apply(additions[i]), "1", signals[i], i), 1, Bench.ARRIVAL, 0));
    }
    Gathering gathering = new Gathering(new GatheringRules(Bench.CALENDAR, Duration.ofHours(4)));
    Instant later = Bench.ARRIVAL.plus(Duration.ofDays(3));
    return new Judge(BOOK, later, Duration.ofHours(12))
        .judge(gathering.gather(Bench.SUBJECT, readings).get(0));
  }

  @Test
  void aGoodSeriesNeedsNothing() {
    assertThat(advice(Nights.water("BW-1", "Pb", 12, Shape.STRAIGHT))).isInstanceOf(Nothing.class);
    assertThat(advice(Nights.water("BW-1", "Pb", 12, Shape.WAITING))).isInstanceOf(Nothing.class);
  }

  /** On the very curve that bent the first series, the planned one is straight enough. */
  @Test
  void aBentSeriesIsPlannedInsideItsStraightRange() {
    int planned = 0;
    for (int round = 0; round < 300; round++) {
      double native0 = 4 + 0.2 * round;
      Outcome outcome = Nights.water("BW-" + round, "Pb", native0, Shape.BENT);
      if (outcome.flags().stream().noneMatch(f -> f.kind() == FlagKind.BENT)
          || !(advice(outcome) instanceof Again again)) {
        continue;
      }
      planned++;
      String place = "native " + native0 + " " + again;
      QuadraticFit bow = QuadraticFit.of(outcome.result().orElseThrow().line()).orElseThrow();
      double most = StraightRange.upTo(bow, 0.025).orElseThrow();
      double[] x = again.plan().portions().stream().mapToDouble(Portion::x).toArray();
      for (Portion portion : again.plan().portions()) {
        assertThat(portion.signal().orElseThrow()).as(place).isLessThanOrEqualTo(most);
      }
      double[] y = new double[x.length];
      double diluted = native0 / again.plan().sampleDilution();
      for (int i = 0; i < x.length; i++) {
        double c = diluted + x[i];
        y[i] = 0.004 * (c - 0.006 * c * c);
      }
      double found = NativeEstimate.of((StraightLine) StraightLine.fit(x, y)).orElseThrow().value();
      assertThat(found / diluted - 1).as(place).isBetween(0.0, 0.05);
    }
    assertThat(planned).isGreaterThan(200);
  }

  /** What the formula beside {@link StraightRange#upTo} promises, on parabolas without noise. */
  @Test
  void theBiasInsideTheStraightRangeIsWhatItsFormulaSays() {
    Random random = new Random(7);
    for (int round = 0; round < 500; round++) {
      double share = 0.005 + 0.04 * random.nextDouble();
      double top = 1.5 + 1.5 * random.nextDouble();
      double bend = share / (1 + top);
      double[] x = new double[400];
      double[] y = new double[x.length];
      for (int i = 0; i < x.length; i++) {
        x[i] = top * i / (x.length - 1);
        y[i] = (1 + x[i]) - bend * (1 + x[i]) * (1 + x[i]);
      }
      StraightLine line = (StraightLine) StraightLine.fit(x, y);
      QuadraticFit bow = QuadraticFit.of(line).orElseThrow();
      String place = "round " + round;
      assertThat(StraightRange.upTo(bow, share).orElseThrow() / y[x.length - 1])
          .as(place)
          .isBetween(1 - 1e-6, 1 + 1e-6);
      assertThat(StraightRange.slopeAtZero(bow).orElseThrow()).isBetween(1 - 1e-6, 1 + 1e-6);
      double k = 1 + top;
      double promised = share * (1 + 4 * k + k * k) / (6 * k) / (1 - share * (1 + k) / k);
      double bias = NativeEstimate.of(line).orElseThrow().value() - 1;
      assertThat(bias / promised).as(place).isBetween(0.98, 1.02);
      assertThat(bias / share).as(place).isBetween(1.1, 1.55);
    }
  }

  @Test
  void anOddFlaskIsPreparedAloneUnlessABendExplainsTheFlasksBetter() {
    RepeatAdvice odd = advice(Nights.water("BW-0414", "Pb", 12, Shape.ODD));
    assertThat(odd).isInstanceOf(SomeFlasks.class);
    assertThat(((SomeFlasks) odd).flasks())
        .singleElement()
        .hasToString(
            "FlaskNeeded[label=F3, contents=10 mL of sample, 40 µL of stock 5 mg/L, made up to 20"
                + " mL]");
    int single = 0;
    for (int round = 0; round < 200; round++) {
      Outcome bent = Nights.water("BW-" + round, "Cd", 20 + round % 30, Shape.BENT);
      single += advice(bent) instanceof SomeFlasks ? 1 : 0;
    }
    assertThat(single).isZero();
  }

  @Test
  void inOneVesselAStepCannotBeMadeAgainAlone() {
    double[] added = {0, 0.1, 0.2, 0.3, 0.4, 0.5};
    double[] signals = {0.1, 0.2, 0.36, 0.4, 0.5, 0.6};
    Outcome flasks = series(Bench::madeUp, added, signals);
    for (int i = 0; i < added.length; i++) {
      signals[i] /= 1 + added[i] / 20;
    }
    Outcome vessel = series(Bench::oneVessel, added, signals);
    assertThat(flasks.verdict()).isEqualTo(Verdict.REVIEW);
    assertThat(vessel.verdict()).isEqualTo(Verdict.REVIEW);
    assertThat(advice(flasks)).isInstanceOf(SomeFlasks.class);
    Again again = again(vessel);
    assertThat(again.plan().vessel()).hasToString("OneVessel[aliquot=10000.0, start=20000.0]");
  }

  @Test
  void missingFlasksFillTheGapsOfTheSeries() {
    Outcome gap =
        series(Bench::madeUp, new double[] {0, 0.1, 0.3}, new double[] {0.1, 0.2, 0.4001});
    assertThat(((SomeFlasks) advice(gap)).flasks())
        .extracting(RepeatAdvice.FlaskNeeded::contents)
        .containsExactly("10 mL of sample, 0.2 mL of stock 10 mg/L, made up to 50 mL");
    Outcome unspiked =
        series(
            Bench::madeUp, new double[] {0.1, 0.2, 0.3, 0.4}, new double[] {0.2, 0.3001, 0.4, 0.5});
    assertThat(((SomeFlasks) advice(unspiked)).flasks())
        .extracting(RepeatAdvice.FlaskNeeded::contents)
        .containsExactly("10 mL of sample, no addition, made up to 50 mL");
  }

  @Test
  void additionsThatWereTooSmallGrowToTheWantedSize() {
    double[] signals = {1.0, 1.012, 1.008, 1.031};
    Outcome outcome = series(Bench::madeUp, new double[] {0, 0.01, 0.02, 0.03}, signals);
    assertThat(outcome.verdict()).isEqualTo(Verdict.REPEAT);
    Again again = again(outcome);
    assertThat(again.plan().topOverNative()).isBetween(1.5, 3.0);
    assertThat(again.plan().forecast().relativeUncertainty())
        .isLessThan(again.before().orElse(1e9));
  }

  @Test
  void scatterThatHidesTheSlopeAsksForLargerAdditions() {
    Outcome outcome =
        series(
            Bench::madeUp, new double[] {0, 0.1, 0.2, 0.3}, new double[] {0.10, 0.30, 0.20, 0.32});
    assertThat(outcome.flags()).extracting(Flag::kind).contains(FlagKind.SLOPE_NOT_ESTABLISHED);
    Again again = again(outcome);
    double top = again.plan().portions().get(again.plan().portions().size() - 1).x();
    assertThat(top * again.plan().sampleDilution()).isGreaterThan(0.3);
    assertThat(again.basis()).contains("a guess");
  }

  @Test
  void whereNothingSizesTheAdditionsThatIsSaid() {
    Outcome falling =
        series(Bench::madeUp, new double[] {0, 0.1, 0.2, 0.3}, new double[] {0.4, 0.3, 0.2, 0.1});
    assertThat(((NoPlan) advice(falling)).help()).contains("the command plan");
    Outcome ungrouped = Nights.ungrouped("BW-1", "Cd");
    assertThat(((NoPlan) advice(ungrouped)).found()).contains("form a series");
  }

  @Test
  void statedAdditionsArePlannedAsConcentrations() {
    Outcome outcome =
        series(
            Bench::stated, new double[] {0, 0.01, 0.02, 0.03}, new double[] {1, 1.03, 1.02, 1.06});
    assertThat(outcome.verdict()).isEqualTo(Verdict.REPEAT);
    assertThat(again(outcome).plan().stock()).isEmpty();
  }
}
