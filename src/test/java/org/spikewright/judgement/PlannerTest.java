package org.spikewright.judgement;

import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.within;

import java.util.ArrayList;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.Random;
import java.util.TreeMap;
import java.util.stream.IntStream;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;
import org.spikewright.fit.NativeEstimate;
import org.spikewright.fit.StraightLine;
import org.spikewright.judgement.RepeatAsk.Instrument;
import org.spikewright.judgement.RepeatAsk.MadeUp;
import org.spikewright.judgement.RepeatAsk.Noise;
import org.spikewright.judgement.RepeatAsk.OneVessel;
import org.spikewright.judgement.RepeatAsk.Stated;
import org.spikewright.judgement.RepeatAsk.Stock;
import org.spikewright.judgement.RepeatAsk.Vessel;
import org.spikewright.judgement.RepeatAsk.Weighed;
import org.spikewright.judgement.RepeatPlan.Portion;
import org.spikewright.judgement.RepeatPlan.Prepared;
import org.spikewright.judgement.RepeatPlan.Refused;
import org.spikewright.quantity.Unit;

class PlannerTest {
  private static final Unit UG_PER_L = Unit.of("µg/L");

  /** 12 µg/L, 10 mL made up to 50 mL, a stock of 10 mg/L. */
  private static RepeatAsk ask() {
    return new RepeatAsk(
        UG_PER_L,
        12,
        12,
        new MadeUp(10_000, OptionalDouble.of(50_000)),
        List.of(new Stock("10 mg/L", 10_000)),
        Optional.empty(),
        new Noise(0, 0.02, 0),
        OptionalDouble.empty(),
        RepeatCaps.DEFAULTS);
  }

  private static RepeatAsk with(RepeatAsk ask, Instrument instrument) {
    return new RepeatAsk(
        ask.unit(),
        ask.estimate(),
        ask.highest(),
        ask.vessel(),
        ask.stocks(),
        Optional.of(instrument),
        ask.noise(),
        ask.target(),
        ask.caps());
  }

  private static RepeatAsk with(RepeatAsk ask, double target) {
    return new RepeatAsk(
        ask.unit(),
        ask.estimate(),
        ask.highest(),
        ask.vessel(),
        ask.stocks(),
        ask.instrument(),
        ask.noise(),
        OptionalDouble.of(target),
        ask.caps());
  }

  private static RepeatAsk with(RepeatAsk ask, Vessel vessel, Stock... stocks) {
    return new RepeatAsk(
        ask.unit(),
        ask.estimate(),
        ask.highest(),
        vessel,
        List.of(stocks),
        ask.instrument(),
        ask.noise(),
        ask.target(),
        ask.caps());
  }

  private static RepeatAsk with(RepeatAsk ask, RepeatCaps caps) {
    return new RepeatAsk(
        ask.unit(),
        ask.estimate(),
        ask.highest(),
        ask.vessel(),
        ask.stocks(),
        ask.instrument(),
        ask.noise(),
        ask.target(),
        caps);
  }

  private static Prepared prepared(RepeatAsk ask) {
    RepeatPlan plan = Planner.plan(ask);
    assertThat(plan).as(plan.toString()).isInstanceOf(Prepared.class);
    return (Prepared) plan;
  }

  private static Refused refused(RepeatAsk ask) {
    RepeatPlan plan = Planner.plan(ask);
    assertThat(plan).as(plan.toString()).isInstanceOf(Refused.class);
    return (Refused) plan;
  }

  private static List<Double> amounts(Prepared plan) {
    return plan.portions().stream().map(Portion::amount).toList();
  }

  @Test
  void aPlainCaseGetsRoundVolumesOfTheStockAsItIs() {
    Prepared plan = prepared(ask());
    // 2 × 12 µg/L × 10 mL / 10 mg/L = 24 µL in three steps would be 8 µL each, below the pipettes'
    // 10 µL; steps of 10 µL come to 2.5 times what is there.
    assertThat(plan.sampleDilution()).isEqualTo(1);
    assertThat(plan.stock()).hasValue(new RepeatPlan.StockUse("10 mg/L", 1, 10_000, 60));
    assertThat(amounts(plan)).containsExactly(0.0, 10.0, 20.0, 30.0);
    assertThat(plan.portions()).extracting(Portion::x).containsExactly(0.0, 10.0, 20.0, 30.0);
    assertThat(plan.topOverNative()).isEqualTo(2.5);
    assertThat(plan.portions().get(1).pipette()).isEqualTo("10 µL to 100 µL");
  }

  @Test
  void aStockThatIsTooStrongIsDilutedFirst() {
    Prepared plan = prepared(with(ask(), ask().vessel(), new Stock("1 g/L", 1_000_000)));
    assertThat(plan.stock().orElseThrow().dilution()).isEqualTo(100);
    assertThat(amounts(plan)).containsExactly(0.0, 10.0, 20.0, 30.0);
  }

  @Test
  void aStockThatFitsGoesBeforeOneThatMustBeDiluted() {
    Prepared plan =
        prepared(
            with(ask(), ask().vessel(), new Stock("1 g/L", 1_000_000), new Stock("working", 2000)));
    assertThat(plan.stock().orElseThrow().name()).isEqualTo("working");
    assertThat(amounts(plan)).containsExactly(0.0, 30.0, 60.0, 90.0);
  }

  @Test
  void aSampleWhoseSignalsWouldLeaveTheTrustedRangeIsDilutedAsLittleAsHelps() {
    // 12 + 18 µg/L at the least top addition; trusted up to 20 µg/L.
    Prepared plan = prepared(with(ask(), new Instrument(OptionalDouble.of(0.2), 0.01, 0)));
    assertThat(plan.sampleDilution()).isEqualTo(2);
    assertThat(plan.portions().get(3).signal().orElseThrow()).isLessThanOrEqualTo(0.2);
  }

  @Test
  void theTopAdditionShrinksBeforeTheSampleIsDiluted() {
    Prepared plan = prepared(with(ask(), new Instrument(OptionalDouble.of(0.435), 0.01, 0.1)));
    assertThat(plan.sampleDilution()).isEqualTo(1);
    assertThat(plan.topOverNative()).isBetween(1.5, 21.5 / 12);
  }

  @Test
  void moreFlasksAreTakenUntilTheTargetIsMet() {
    double four = prepared(ask()).forecast().relativeUncertainty();
    Prepared plan = prepared(with(ask(), 0.6 * four));
    assertThat(plan.portions()).hasSizeGreaterThan(4);
    assertThat(plan.forecast().relativeUncertainty()).isLessThanOrEqualTo(0.6 * four);
    assertThat(plan.remarks()).isEmpty();
  }

  @Test
  void aTargetOutOfReachIsSaidWithWhatIsMissing() {
    Prepared plan = prepared(with(ask(), 0.001));
    assertThat(plan.portions()).hasSize(RepeatCaps.DEFAULTS.mostFlasks());
    assertThat(plan.remarks())
        .singleElement()
        .asString()
        .contains("target of 0.10 %", "at most 12 flasks", "scatter");
  }

  @Test
  void statedAdditionsAreConcentrations() {
    Prepared plan = prepared(with(ask(), new Stated()));
    assertThat(plan.stock()).isEmpty();
    assertThat(amounts(plan)).containsExactly(0.0, 8.0, 16.0, 24.0);
    assertThat(plan.portions()).extracting(Portion::pipette).containsOnly("");
  }

  @Test
  void weighedAdditionsAreMasses() {
    Prepared plan = prepared(with(ask(), new Weighed(10_000), new Stock("S", 1000)));
    assertThat(amounts(plan)).containsExactly(0.0, 100.0, 200.0, 300.0);
    assertThat(plan.remarks()).singleElement().asString().contains("Weigh what was delivered");
    assertThat(PlanWords.amount(plan, plan.portions().get(1))).isEqualTo("100 mg");
  }

  @Test
  void oneVesselIsMeasuredByRisingAdditionsAndSaysWhatDriftDoes() {
    Prepared plan = prepared(with(ask(), new OneVessel(10_000, 20_000), new Stock("S", 10_000)));
    assertThat(amounts(plan)).containsExactly(0.0, 10.0, 10.0, 10.0);
    assertThat(plan.order()).containsExactly(1, 2, 3, 4);
    assertThat(plan.driftEffect()).isGreaterThan(0.01);
    assertThat(plan.remarks()).singleElement().asString().contains("check solution");
  }

  @Test
  void aRefusalNamesTheCapAndWhatWouldHelp() {
    Refused weak =
        refused(with(with(ask(), new OneVessel(10_000, 20_000), new Stock("S", 50)), few(1, 1)));
    assertThat(weak.cap()).isEqualTo("largest share of the volume");
    assertThat(weak.found()).contains("3600 µL", "10 % of the vessel's 20000 µL", "2000 µL");
    assertThat(weak.help()).contains("at least 90 µg/L");

    Refused flask =
        refused(
            with(
                with(ask(), new MadeUp(10_000, OptionalDouble.of(10_000)), new Stock("S", 10_000)),
                few(1, 1)));
    assertThat(flask.cap()).isEqualTo("volume of the flask");
    assertThat(flask.help()).isEqualTo("A smaller aliquot or a larger flask.");

    Refused strong =
        refused(with(with(ask(), ask().vessel(), new Stock("S", 1_000_000)), few(1, 10)));
    assertThat(strong.cap()).isEqualTo("largest dilution of a stock");
    assertThat(strong.help()).contains("at most 120000 µg/L");

    Refused bright =
        refused(with(with(ask(), new Instrument(OptionalDouble.of(0.01), 0.01, 0)), few(10, 1)));
    assertThat(bright.cap()).isEqualTo("largest dilution");
    assertThat(bright.help()).contains("at least 30-fold");

    assertThat(refused(with(ask(), ask().vessel())).cap()).isEqualTo("stock");
    assertThat(refused(with(ask(), RepeatCaps.DEFAULTS.withPipettes(List.of()))).cap())
        .isEqualTo("pipettes");
  }

  private static RepeatCaps few(double dilution, double stockDilution) {
    RepeatCaps all = RepeatCaps.DEFAULTS;
    return new RepeatCaps(
        all.largestShare(),
        all.flasks(),
        all.mostFlasks(),
        all.replicates(),
        all.topAddition(),
        dilution,
        stockDilution,
        all.noise(),
        all.pipettes());
  }

  @Test
  void scatterAsLargeAsTheEffectIsNoPlan() {
    RepeatAsk quiet = ask();
    RepeatAsk loud =
        new RepeatAsk(
            quiet.unit(),
            12,
            12,
            quiet.vessel(),
            quiet.stocks(),
            Optional.empty(),
            new Noise(20, 0, 0),
            OptionalDouble.empty(),
            quiet.caps());
    assertThat(refused(loud).cap()).isEqualTo("scatter");
  }

  /** What thousands of laboratories might ask. */
  private static RepeatAsk random(Random random) {
    double estimate = Math.pow(10, 4 * random.nextDouble() - 1);
    double aliquot = Math.pow(10, 2 + 2.5 * random.nextDouble());
    Vessel vessel =
        switch (random.nextInt(4)) {
          case 0 -> new OneVessel(aliquot, aliquot * (1 + 2 * random.nextDouble()));
          case 1 -> new Stated();
          case 2 -> new Weighed(aliquot);
          default ->
              new MadeUp(aliquot, OptionalDouble.of(aliquot * (1 + 4 * random.nextDouble())));
        };
    List<Stock> stocks = new ArrayList<>();
    for (int i = vessel instanceof Stated ? 3 : random.nextInt(3); i < 3; i++) {
      stocks.add(new Stock("S" + i, estimate * Math.pow(10, 5 * random.nextDouble())));
    }
    double slope = Math.pow(10, 6 * random.nextDouble() - 3);
    double baseline = random.nextBoolean() ? 0 : slope * estimate * random.nextDouble();
    double most = baseline + slope * estimate * Math.pow(10, 3 * random.nextDouble() - 2);
    Optional<Instrument> instrument =
        random.nextInt(3) == 0
            ? Optional.empty()
            : Optional.of(new Instrument(OptionalDouble.of(most), slope, baseline));
    int flasks = 4 + random.nextInt(5);
    List<Pipette> pipettes = new ArrayList<>(RepeatCaps.DEFAULTS.pipettes());
    pipettes.remove(random.nextInt(3));
    pipettes.add(new Pipette("small", 2, 20, 0.02));
    RepeatCaps caps =
        new RepeatCaps(
            0.02 + 0.2 * random.nextDouble(),
            flasks,
            flasks + random.nextInt(6),
            1 + random.nextInt(3),
            1.5 + 1.5 * random.nextDouble(),
            Math.pow(10, random.nextInt(4)),
            Math.pow(10, random.nextInt(4)),
            0.02,
            pipettes);
    return new RepeatAsk(
        UG_PER_L,
        estimate,
        estimate * (1 + random.nextDouble()),
        vessel,
        stocks,
        instrument,
        new Noise(0.01 * estimate * random.nextDouble(), 0.05 * random.nextDouble(), 0),
        random.nextBoolean()
            ? OptionalDouble.empty()
            : OptionalDouble.of(0.2 * random.nextDouble()),
        caps);
  }

  @ParameterizedTest
  @ValueSource(longs = {1, 2, 3, 4})
  void everyPlanKeepsToEveryCap(long seed) {
    Random random = new Random(seed);
    Map<String, Integer> seen = new TreeMap<>();
    for (int round = 0; round < 2500; round++) {
      RepeatAsk ask = random(random);
      String place = "seed " + seed + " round " + round;
      RepeatPlan plan = Planner.plan(ask);
      if (plan instanceof Prepared prepared) {
        keepsToCaps(place, ask, prepared);
        isEven(place, ask, prepared);
        isNotRising(place, ask, prepared);
        seen.merge("plan", 1, Integer::sum);
        if (round % 10 == 0) {
          assertThat(Planner.plan(ask)).as(place).isEqualTo(plan);
        }
      } else {
        Refused refused = (Refused) plan;
        assertThat(refused.found()).as(place).isNotBlank().doesNotContain("NaN", "Infinity");
        assertThat(refused.help()).as(place).isNotBlank().doesNotContain("NaN", "Infinity");
        seen.merge(refused.cap(), 1, Integer::sum);
      }
    }
    assertThat(seen.get("plan")).as(seen.toString()).isGreaterThan(1000);
    assertThat(seen).hasSizeGreaterThan(4);
  }

  private static void keepsToCaps(String place, RepeatAsk ask, Prepared plan) {
    RepeatCaps caps = ask.caps();
    assertThat(plan.topOverNative()).as(place).isBetween(1.5 * (1 - 1e-9), 3 * (1 + 1e-9));
    assertThat(plan.sampleDilution()).as(place).isBetween(1.0, caps.largestDilution());
    assertThat(plan.portions().size()).as(place).isBetween(caps.flasks(), caps.mostFlasks());
    assertThat(plan.replicates()).isEqualTo(caps.replicates());
    plan.stock()
        .ifPresent(
            stock ->
                assertThat(stock.dilution()).as(place).isBetween(1.0, caps.largestStockDilution()));
    for (Portion portion : plan.portions()) {
      boolean piped = portion.amount() > 0 && !(ask.vessel() instanceof Stated);
      assertThat(portion.pipette().isEmpty()).as(place).isNotEqualTo(piped);
      if (piped) {
        Pipette pipette =
            caps.pipettes().stream()
                .filter(p -> p.name().equals(portion.pipette()))
                .findFirst()
                .orElseThrow();
        assertThat(portion.amount()).as(place).isBetween(pipette.lowest(), pipette.highest());
        double steps = portion.amount() / pipette.increment();
        assertThat(steps).as(place).isCloseTo(Math.rint(steps), within(1e-4));
      }
      double trusted = ask.instrument().map(i -> i.mostSignal().getAsDouble()).orElse(1e300);
      assertThat(portion.signal().orElse(0)).as(place).isLessThanOrEqualTo(trusted);
    }
    double top = plan.portions().get(plan.portions().size() - 1).amount();
    if (ask.vessel() instanceof MadeUp flask) {
      double all = flask.aliquot() + top;
      assertThat(all).as(place).isLessThanOrEqualTo(flask.finalVolume().orElse(1e300) + 1e-6);
    }
    if (ask.vessel() instanceof OneVessel vessel) {
      double all = plan.portions().stream().mapToDouble(Portion::amount).sum();
      assertThat(all / vessel.start()).as(place).isLessThanOrEqualTo(caps.largestShare() + 1e-9);
    }
  }

  /** Levels are evenly spaced, from no addition up, at least four. */
  private static void isEven(String place, RepeatAsk ask, Prepared plan) {
    double[] levels = plan.portions().stream().mapToDouble(Portion::x).distinct().toArray();
    assertThat(levels.length).as(place).isGreaterThanOrEqualTo(4);
    for (int i = 0; i < levels.length; i++) {
      double even = levels[levels.length - 1] * i / (levels.length - 1);
      assertThat(levels[i]).as(place).isCloseTo(even, within(1e-9 * levels[levels.length - 1]));
    }
    double sum = plan.portions().stream().mapToDouble(Portion::amount).sum();
    plan.stock().ifPresent(stock -> assertThat(stock.needed()).isEqualTo(sum));
  }

  private static void isNotRising(String place, RepeatAsk ask, Prepared plan) {
    List<Integer> rising = IntStream.rangeClosed(1, plan.portions().size()).boxed().toList();
    assertThat(plan.order()).as(place).containsExactlyInAnyOrderElementsOf(rising);
    if (ask.vessel() instanceof OneVessel) {
      return;
    }
    assertThat(plan.order()).as(place).isNotEqualTo(rising);
    // In rising order 1 % of drift moves the result by more than 1 %.
    assertThat(plan.driftEffect()).as(place).isLessThan(0.003);
    assertThat(moved(plan, plan.order())).as(place).isCloseTo(plan.driftEffect(), within(2e-3));
    assertThat(moved(plan, rising)).as(place).isGreaterThan(0.009);
  }

  /** By how much a fall of 1 % over the flasks, in an order, moves the fitted result. */
  private static double moved(Prepared plan, List<Integer> order) {
    double[] x = plan.portions().stream().mapToDouble(Portion::x).toArray();
    double[] y = new double[x.length];
    for (int place = 0; place < x.length; place++) {
      int flask = order.get(place) - 1;
      y[flask] = (x[flask] + plan.nativeConcentration()) * (1 - 0.01 * place / (x.length - 1));
    }
    double found = NativeEstimate.of((StraightLine) StraightLine.fit(x, y)).orElseThrow().value();
    return Math.abs(found / plan.nativeConcentration() - 1);
  }

  @ParameterizedTest
  @ValueSource(longs = {11, 12, 13})
  void theForecastAgreesWithASimulation(long seed) {
    Random random = new Random(seed);
    int compared = 0;
    while (compared < 15) {
      RepeatAsk ask = random(random);
      if (!(Planner.plan(ask) instanceof Prepared plan) || !(plan.forecast().g() < 0.02)) {
        continue;
      }
      compared++;
      double[] x = plan.portions().stream().mapToDouble(Portion::x).toArray();
      double native0 = plan.nativeConcentration();
      double squares = 0;
      int runs = 8000;
      for (int run = 0; run < runs; run++) {
        double[] y = new double[x.length];
        for (int i = 0; i < x.length; i++) {
          y[i] = x[i] + native0 + ask.noise().at(x[i] + native0) * random.nextGaussian();
        }
        double found =
            NativeEstimate.of((StraightLine) StraightLine.fit(x, y)).orElseThrow().value();
        squares += (found - native0) * (found - native0);
      }
      double simulated = Math.sqrt(squares / runs) / native0;
      assertThat(plan.forecast().relativeStandardUncertainty())
          .as("seed %s plan %s", seed, plan)
          .isCloseTo(simulated, within(0.04 * simulated));
    }
  }
}
