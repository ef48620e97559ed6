package org.spikewright.quantity;

import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.assertThatThrownBy;

import java.util.Optional;
import java.util.Random;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.junit.jupiter.params.provider.ValueSource;

class NumberGrammarTest {
  private static final NumberGrammar GROUPED = new NumberGrammar(',', Optional.of('.'));

  @ParameterizedTest(name = "{0} is {1}")
  @CsvSource({
    "0,0",
    "12,12",
    "-3.5,-3.5",
    "+2,2",
    ".5,0.5",
    "5.,5",
    "1e3,1000",
    "1.5E-3,0.0015",
    "'  7 ',7",
    "\u22124,-4",
    "1e+2,100",
    "00012,12",
    "0.1234567890123456,0.1234567890123456"
  })
  void readsNumbersWithAPoint(String text, double value) {
    assertThat(NumberGrammar.POINT.parse(text)).hasValue(value);
  }

  @ParameterizedTest(name = "''{0}'' is no number")
  @ValueSource(
      strings = {
        "",
        " ",
        "NaN",
        "Infinity",
        "-Infinity",
        "1d",
        "2f",
        "0x1p3",
        "1e400",
        "-1e400",
        "1,5",
        "1.2.3",
        "1 000",
        "١٢",
        "１",
        "--1",
        "+-1",
        "e5",
        "1e",
        "1e+",
        ".",
        "-",
        "1e5.0",
        "<0.01",
        "1_000",
        "12 mL"
      })
  void refusesEverythingElse(String text) {
    assertThat(NumberGrammar.POINT.parse(text)).isEmpty();
  }

  @ParameterizedTest(name = "{0} is {1}")
  @CsvSource(
      delimiter = ';',
      value = {"1,5;1.5", "1.234,5;1234.5", "12.345.678;12345678", "1234,5;1234.5", ",5;0.5"})
  void readsGroupedNumbersWithAComma(String text, double value) {
    assertThat(GROUPED.parse(text)).hasValue(value);
  }

  @ParameterizedTest(name = "''{0}'' is wrongly grouped")
  @ValueSource(
      strings = {"1.5", "1.23", "1234.567", ".123", "1.2345", "1..234", "1.234.56", "1,234.5"})
  void refusesWrongGrouping(String text) {
    assertThat(GROUPED.parse(text)).isEmpty();
  }

  @Test
  void refusesMarksThatCannotBeToldApart() {
    assertThatThrownBy(() -> new NumberGrammar(',', Optional.of(',')))
        .isInstanceOf(IllegalArgumentException.class);
  }

  @Test
  void readsBackWhatIsPrinted() {
    long seed = 20250115;
    Random random = new Random(seed);
    for (int i = 0; i < 20_000; i++) {
      double value = (random.nextDouble() - 0.5) * Math.pow(10, random.nextInt(60) - 30);
      String printed = Numbers.plain(value);
      assertThat(NumberGrammar.POINT.parse(printed))
          .as("seed %s, %s", seed, printed)
          .hasValue(value);
    }
  }

  @Test
  void digitsWithAMarkAmongThemGiveTheNearestDouble() {
    long seed = 99;
    Random random = new Random(seed);
    for (int i = 0; i < 100_000; i++) {
      int length = 1 + random.nextInt(18);
      StringBuilder text = new StringBuilder();
      for (int digit = 0; digit < length; digit++) {
        text.append((char) ('0' + random.nextInt(10)));
      }
      text.insert(random.nextInt(length + 1), '.');
      assertThat(NumberGrammar.POINT.parse(text.toString()))
          .as("seed %s, %s", seed, text)
          .hasValue(Double.parseDouble(text.toString()));
    }
    assertThat(NumberGrammar.POINT.parse(".")).isEmpty();
  }

  @Test
  void neverThrowsAndNeverGivesWhatIsNotFinite() {
    long seed = 7;
    Random random = new Random(seed);
    String alphabet = "0123456789.,+-eE NaNd\u2212";
    int numbers = 0;
    for (int i = 0; i < 50_000; i++) {
      StringBuilder text = new StringBuilder();
      for (int length = random.nextInt(8); length > 0; length--) {
        text.append(alphabet.charAt(random.nextInt(alphabet.length())));
      }
      var value = GROUPED.parse(text.toString());
      if (value.isPresent()) {
        numbers++;
        assertThat(value.getAsDouble()).as("seed %s, '%s'", seed, text).isFinite();
      }
    }
    assertThat(numbers).as("some texts were numbers").isGreaterThan(1000);
  }
}
