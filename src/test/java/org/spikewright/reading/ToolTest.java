package org.spikewright.reading;

import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.assertThatThrownBy;
import static org.assertj.core.api.Assertions.within;

import java.time.LocalDate;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.Random;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.spikewright.quantity.Measured;
import org.spikewright.quantity.PlusMinus;
import org.spikewright.quantity.PlusMinus.Meaning;
import org.spikewright.quantity.Quantity;
import org.spikewright.quantity.Unit;
import org.spikewright.reading.Accuracies.Accuracy;
import org.spikewright.reading.Tool.Kind;
import org.spikewright.reading.Tool.Point;

class ToolTest {
  private static final Unit UL = Unit.of("µL");
  private static final Unit ML = Unit.of("mL");

  /** 2 µL at 20, 1 µL at 100, 3 µL at 200. */
  private static final Tool PISTON =
      new Tool(
          "P200",
          Kind.PISTON_PIPETTE,
          UL,
          List.of(new Point(20, 2, 0.2), new Point(100, 1, 0.4), new Point(200, 3, 0.6)),
          true,
          PlusMinus.of(Meaning.STANDARD),
          "our certificate");

  private static Tool of(Kind kind, double volume, double error, double random) {
    List<Point> points = List.of(new Point(volume, error, random));
    return new Tool("glass", kind, ML, points, false, PlusMinus.RECTANGULAR, "");
  }

  private static Quantity microlitres(double value) {
    return new Quantity(value, UL);
  }

  /** Worked out by hand: linear between the points, level below, equal strokes above. */
  @ParameterizedTest(name = "{0} µL: ± {1} systematic, {2} random, relative, in {3} strokes")
  @CsvSource({
    "20, 0.1, 0.01, 1",
    "60, 0.025, 0.005, 1",
    "100, 0.01, 0.004, 1",
    "150, 0.013333333333333334, 0.0033333333333333335, 1",
    "200, 0.015, 0.003, 1",
    "10, 0.2, 0.02, 1",
    "200.00000001, 0.015, 0.003, 1",
    "400, 0.015, 0.0021213203435596424, 2",
    "300, 0.013333333333333334, 0.002357022603955158, 2"
  })
  void errorsGoLinearlyFromPointToPoint(
      double volume, double systematic, double random, double strokes) {
    Accuracy accuracy = PISTON.accuracy(microlitres(volume)).orElseThrow();
    assertThat(accuracy.systematic()).isCloseTo(systematic, within(1e-9));
    assertThat(accuracy.random()).isCloseTo(random, within(1e-9));
    assertThat(PISTON.strokes(microlitres(volume))).isEqualTo(strokes);
  }

  @Test
  void theOriginSaysWhatStandsInTheTable() {
    assertThat(PISTON.accuracy(microlitres(60)).orElseThrow().origin())
        .isEqualTo("P200: ± 1.5 µL, standard; random 0.3 µL; our certificate");
    assertThat(PISTON.accuracy(microlitres(400)).orElseThrow().origin())
        .contains("in 2 strokes", "± 3 µL");
    Tool flask = of(Kind.FLASK, 100, 0.1, 0);
    assertThat(flask.accuracy(new Quantity(0.1, Unit.of("L"))).orElseThrow())
        .isEqualTo(new Accuracy(0.1 / Math.sqrt(3) / 100, 0, "glass: ± 0.1 mL, rectangular"));
  }

  @Test
  void whatWasNotMeasuredHasNoError() {
    assertThat(PISTON.accuracy(microlitres(0))).isEmpty();
    assertThat(PISTON.refusal(microlitres(0))).isEmpty();
  }

  @ParameterizedTest(name = "{0} of {1} mL measures {2} mL: {3}")
  @CsvSource(
      nullValues = "yes",
      value = {
        "FLASK,100,100,yes",
        "FLASK,100,200,100 mL",
        "FLASK,100,99.9,100 mL",
        "PIPETTE,10,10,yes",
        "PIPETTE,10,20,yes",
        "PIPETTE,10,15,'10 mL, or a multiple of it'",
        "PIPETTE,10,5,'10 mL, or a multiple of it'",
        "PISTON_PIPETTE,1,3,yes"
      })
  void glasswareOfOneVolumeRefusesOthers(Kind kind, double of, double volume, String instead) {
    assertThat(of(kind, of, 0.1, 0).refusal(new Quantity(volume, ML)))
        .isEqualTo(Optional.ofNullable(instead));
  }

  @Test
  void aMassIsNoVolumeAndABalanceHasAnEnd() {
    Tool balance =
        new Tool(
            "balance",
            Kind.BALANCE,
            Unit.of("g"),
            List.of(new Point(0.02, 0.0002, 0), new Point(200, 0.0002, 0)),
            true,
            PlusMinus.RECTANGULAR,
            "");
    assertThat(balance.refusal(new Quantity(1, ML))).contains("a mass");
    assertThat(balance.refusal(new Quantity(201, Unit.of("g")))).contains("0.02 g to 200 g");
    assertThat(balance.refusal(new Quantity(5, Unit.of("mg")))).isEmpty();
    assertThat(balance.holds(new Quantity(5, Unit.of("mg")))).isFalse();
    assertThat(balance.holds(new Quantity(1, ML))).isFalse();
  }

  @Test
  void severalUsesOfOnePipetteShareTheirSystematicErrorOnly() {
    long seed = 11;
    Random random = new Random(seed);
    for (int i = 0; i < 500; i++) {
      double nominal = 0.1 + 10 * random.nextDouble();
      int times = 1 + random.nextInt(9);
      Tool pipette = of(Kind.PIPETTE, nominal, random.nextDouble(), random.nextDouble());
      Accuracy once = pipette.accuracy(new Quantity(nominal, ML)).orElseThrow();
      Accuracy often = pipette.accuracy(new Quantity(times * nominal, ML)).orElseThrow();
      assertThat(often.systematic()).as("seed %s", seed).isCloseTo(once.systematic(), within(1e-9));
      assertThat(often.random())
          .as("seed %s", seed)
          .isCloseTo(once.random() / Math.sqrt(times), within(1e-9));
    }
  }

  @Test
  void refusesPointsThatDoNotRise() {
    List<Point> falling = List.of(new Point(2, 1, 0), new Point(1, 1, 0));
    List<Point> none = List.of();
    List<Point> unknown = List.of(new Point(Double.NaN, 1, 0), new Point(2, 1, 0));
    for (List<Point> points : List.of(falling, none, unknown)) {
      assertThatThrownBy(
              () -> new Tool("x", Kind.BURETTE, ML, points, true, PlusMinus.RECTANGULAR, ""))
          .isInstanceOf(IllegalArgumentException.class);
    }
  }

  @ParameterizedTest(name = "{0} with k {1}: 1 stands for {2}")
  @CsvSource({
    "RECTANGULAR,0,0.5773502691896258",
    "TRIANGULAR,0,0.4082482904638631",
    "STANDARD,0,1",
    "EXPANDED,2,0.5",
    "EXPANDED,2.5,0.4"
  })
  void whatPlusMinusStandsFor(Meaning meaning, double k, double standard) {
    PlusMinus means = k > 0 ? PlusMinus.expanded(k) : PlusMinus.of(meaning);
    assertThat(means.standard(1)).isCloseTo(standard, within(1e-15));
    assertThat(means.meaning()).isEqualTo(meaning);
  }

  @Test
  void aStockKnowsEachOfItsAnalytes() {
    Measured cadmium = new Measured(new Quantity(2, Unit.of("mg/L")), OptionalDouble.of(0.02));
    Stock stock =
        new Stock(
            "mix",
            Optional.empty(),
            Map.of("Cd", cadmium, "Zn", Measured.exactly(new Quantity(5, Unit.of("mg/L")))),
            PlusMinus.expanded(2),
            "certificate 7",
            Optional.of(LocalDate.of(2026, 6, 30)));
    assertThat(stock.accuracy("Cd").orElseThrow())
        .isEqualTo(new Accuracy(0.005, 0, "mix: ± 0.02 mg/L, expanded, k = 2; certificate 7"));
    assertThat(stock.accuracy("Zn")).isEmpty();
    assertThat(stock.of("Pb")).isEmpty();
    assertThat(stock.bottle().isExpiredOn(LocalDate.of(2026, 6, 30))).isFalse();
    assertThat(stock.bottle().isExpiredOn(LocalDate.of(2026, 7, 1))).isTrue();
    assertThat(new Bottle("mix", Optional.empty()).isExpiredOn(LocalDate.MAX)).isFalse();
  }
}
