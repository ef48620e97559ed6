package org.spikewright.quantity;

import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.assertThatThrownBy;

import java.math.BigDecimal;
import java.util.OptionalDouble;
import java.util.Random;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.junit.jupiter.params.provider.ValueSource;

class NumbersTest {

  @ParameterizedTest(name = "{0} is printed {1}")
  @CsvSource({
    "20.0,20",
    "0.05,0.05",
    "1.5E-9,1.5E-9",
    "100000.0,100000",
    "1E14,100000000000000",
    "1E15,1.0E15",
    "-0.0,0",
    "0,0",
    "-2.50,-2.5",
    "0.000001,0.000001",
    "1E-7,1.0E-7"
  })
  void printsTheShortestTextThatReadsBack(double value, String printed) {
    assertThat(Numbers.plain(value)).isEqualTo(printed);
    assertThat(Double.parseDouble(Numbers.plain(value))).isEqualTo(value + 0.0);
  }

  @Test
  void aShortDecimalIsPrintedAsItIsAndReadsBackAsItWas() {
    long seed = 4711;
    Random random = new Random(seed);
    for (int i = 0; i < 100_000; i++) {
      BigDecimal decimal =
          BigDecimal.valueOf(random.nextLong() % 1_000_000_000_000L, random.nextInt(9));
      double value = decimal.doubleValue();
      String exact = value == 0 ? "0" : decimal.stripTrailingZeros().toPlainString();
      if (value == 0 || Math.abs(value) >= 1e-6) {
        assertThat(Numbers.plain(value)).as("seed %s, %s", seed, decimal).isEqualTo(exact);
      }
      double any = value * random.nextDouble();
      assertThat(Double.parseDouble(Numbers.plain(any))).as("seed %s", seed).isEqualTo(any + 0.0);
    }
  }

  @Test
  void aQuantityPrintsItsUnitButNotThatOfPlainNumbers() {
    assertThat(new Quantity(20, Unit.of("mL"))).hasToString("20 mL");
    assertThat(new Quantity(0.25, Unit.ONE)).hasToString("0.25");
    assertThat(new Measured(new Quantity(20, Unit.of("ml")), OptionalDouble.of(0.03)))
        .hasToString("20 mL ± 0.03 mL");
  }

  @ParameterizedTest
  @ValueSource(doubles = {Double.NaN, Double.POSITIVE_INFINITY, Double.NEGATIVE_INFINITY})
  void aQuantityIsFinite(double value) {
    assertThatThrownBy(() -> new Quantity(value, Unit.of("mL")))
        .isInstanceOf(IllegalArgumentException.class);
  }
}
