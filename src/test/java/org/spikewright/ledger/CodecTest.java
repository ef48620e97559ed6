package org.spikewright.ledger;

import static org.assertj.core.api.Assertions.assertThat;

import java.time.LocalDate;
import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.OptionalInt;
import java.util.Random;
import org.junit.jupiter.api.Test;
import org.spikewright.judgement.Verdict;
import org.spikewright.quantity.Dimension;
import org.spikewright.quantity.Measured;
import org.spikewright.quantity.Quantity;
import org.spikewright.quantity.Unit;
import org.spikewright.reading.Accuracies;
import org.spikewright.reading.Addition;
import org.spikewright.reading.Blanks;
import org.spikewright.reading.Bottle;
import org.spikewright.reading.Calculation;
import org.spikewright.reading.Design;
import org.spikewright.reading.FlaskFacts;
import org.spikewright.reading.InternalStandard;
import org.spikewright.reading.MethodFacts;
import org.spikewright.reading.Preparation;
import org.spikewright.reading.Role;
import org.spikewright.reading.SampleId;
import org.spikewright.reading.Subject;
import org.spikewright.series.SeriesKey;
import org.spikewright.summary.ResultRow;
import org.spikewright.summary.RowEvidence;

class CodecTest {
  private static final String[] WORDS = {
    "",
    " ",
    "F1",
    "=1+1",
    "a\tb",
    "back\\slash",
    "\\t",
    "line\nbreak",
    "µg",
    "~",
    "!",
    "\u241b",
    "nul\0",
    "half \ud800",
    "\udc00 half",
    "pair \ud83d\ude00",
    "\u241b0000"
  };

  private final Random random = new Random(20250115);

  @Test
  void factsReadBackAsTheyWereAndEqualFactsAreEqualTexts() {
    for (int i = 0; i < 5_000; i++) {
      FlaskFacts facts = facts();
      String content = FactsCodec.encode(facts);
      FlaskFacts back = FactsCodec.decode(StoredText.decode(StoredText.encode(content)));
      assertThat(back).as("case %d", i).isEqualTo(facts);
      assertThat(FactsCodec.encode(back)).as("case %d", i).isEqualTo(content);
    }
  }

  @Test
  void resultsReadBackAsTheyWere() {
    for (int i = 0; i < 2_000; i++) {
      ResultRow row = result();
      assertThat(ResultCodec.decode(ResultCodec.encode(row))).as("case %d", i).isEqualTo(row);
    }
  }

  @Test
  void doublesReadBackBitForBit() {
    double[] nasty = {
      0.0,
      -0.0,
      0.1,
      0.3,
      1.0 / 3,
      2e-3,
      2e23,
      1e22,
      1e-12,
      Double.MIN_VALUE,
      Double.MAX_VALUE,
      1L << 53,
      (1L << 53) + 2,
      -20.05,
      123456789.123456,
      Double.NaN,
      Double.POSITIVE_INFINITY
    };
    for (double value : nasty) {
      same(value);
    }
    for (int i = 0; i < 100_000; i++) {
      same(Double.longBitsToDouble(random.nextLong()));
      same(random.nextInt(1_000_000) / 1e3);
    }
  }

  @Test
  void shortDecimalsStayReadable() {
    assertThat(List.of(20.0, 0.05, -1.5, 0.0, 1e-6, 1234.5678))
        .extracting(ExactDouble::text)
        .containsExactly("20", "0.05", "-1.5", "0", "0.000001", "1234.5678");
    assertThat(FactsCodec.encode(Samples.facts(50)))
        .contains("50 µL")
        .contains("10~0.05 mg/L")
        .contains("20 mL");
  }

  @Test
  void textThatDatabasesCannotKeepReadsBackAsItWas() {
    for (String word : WORDS) {
      assertThat(StoredText.decode(StoredText.encode(word))).isEqualTo(word);
      assertThat(StoredText.encode(word)).doesNotContain("\0");
    }
    assertThat(StoredText.encode("\ud800")).isNotEqualTo(StoredText.encode("\udc00"));
  }

  @Test
  void aNamedPreparationIsItsNameWhateverElseIsKnown() {
    Preparation named = new Preparation(Optional.of("digest A"), 10, none(), none(), noDouble());
    Preparation corrected =
        new Preparation(Optional.of("digest A"), 20, none(), none(), noDouble());
    Preparation unnamed = new Preparation(Optional.empty(), 10, none(), none(), noDouble());
    assertThat(FactsCodec.identity(named)).isEqualTo(FactsCodec.identity(corrected));
    assertThat(FactsCodec.identity(named)).isNotEqualTo(FactsCodec.identity(unnamed));
  }

  private static void same(double value) {
    assertThat(Double.doubleToLongBits(ExactDouble.parse(ExactDouble.text(value))))
        .as(ExactDouble.text(value))
        .isEqualTo(Double.doubleToLongBits(value));
  }

  private FlaskFacts facts() {
    return new FlaskFacts(
        pick(Role.values()),
        pick(Design.values()),
        addition(),
        optional(),
        optional(),
        optional(),
        new Preparation(
            random.nextBoolean() ? Optional.empty() : Optional.of(pick(WORDS)),
            number(),
            optional().map(Measured::quantity),
            optional().map(Measured::quantity),
            optionalNumber()),
        new Blanks(optionalNumber(), optional(), optional()),
        method(),
        random.nextBoolean()
            ? Optional.empty()
            : Optional.of(
                new InternalStandard(
                    pick(InternalStandard.Given.values()), optional(), optionalNumber())),
        random.nextBoolean()
            ? Accuracies.NONE
            : new Accuracies(
                accuracy(),
                accuracy(),
                accuracy(),
                accuracy(),
                accuracy(),
                accuracy(),
                accuracy(),
                accuracy(),
                accuracy()),
        random.nextBoolean() ? Optional.empty() : Optional.of(bottle()));
  }

  private Bottle bottle() {
    return new Bottle(
        pick(WORDS),
        random.nextBoolean()
            ? Optional.empty()
            : Optional.of(LocalDate.ofEpochDay(random.nextInt(100_000) - 50_000)));
  }

  private Addition addition() {
    return switch (random.nextInt(3)) {
      case 0 -> new Addition.OfStock(quantity(), measured());
      case 1 ->
          new Addition.OfStocks(
              List.of(
                  new Addition.OfStock(quantity(), measured()),
                  new Addition.OfStock(quantity(), measured())));
      default -> new Addition.Stated(quantity(), pick(Addition.Terms.values()));
    };
  }

  private Optional<Accuracies.Accuracy> accuracy() {
    return random.nextBoolean()
        ? Optional.empty()
        : Optional.of(new Accuracies.Accuracy(number(), number(), pick(WORDS)));
  }

  private MethodFacts method() {
    return new MethodFacts(
        pick(WORDS),
        unit(),
        random.nextInt(9),
        random.nextBoolean(),
        optionalNumber(),
        optionalNumber(),
        optionalNumber(),
        random.nextBoolean()
            ? Optional.empty()
            : Optional.of(new MethodFacts.WorkingRange(number(), number())),
        optionalNumber(),
        random.nextBoolean(),
        new Calculation(
            pick(Calculation.Interval.values()),
            pick(Calculation.Weights.values()),
            pick(Calculation.Bend.values()),
            random.nextBoolean()),
        random.nextBoolean()
            ? Optional.empty()
            : Optional.of(
                new MethodFacts.Electrode(
                    random.nextInt(9) - 4, optionalNumber(), optionalNumber())),
        random.nextBoolean() ? Optional.empty() : Optional.of(unit()));
  }

  private ResultRow result() {
    Subject subject = new Subject(pick(WORDS), new SampleId(pick(WORDS)), pick(WORDS), pick(WORDS));
    return new ResultRow(
        new SeriesKey(LocalDate.of(2025, 1, 15), subject, pick(WORDS), pick(WORDS), 2),
        pick(WORDS),
        pick(WORDS),
        optionalNumber(),
        pick(WORDS),
        pick(WORDS),
        optionalNumber(),
        optionalNumber(),
        optionalNumber(),
        optionalNumber(),
        optionalNumber(),
        optionalNumber(),
        optionalNumber(),
        optionalNumber(),
        pick(WORDS),
        optionalNumber(),
        pick(Verdict.values()),
        words(),
        words(),
        random.nextInt(),
        random.nextInt(),
        optionalNumber(),
        optionalNumber(),
        optionalNumber(),
        random.nextBoolean() ? OptionalInt.empty() : OptionalInt.of(random.nextInt()),
        optionalNumber(),
        pick(WORDS),
        words(),
        new RowEvidence(
            pick(WORDS),
            random.nextInt(),
            optionalNumber(),
            optionalNumber(),
            optionalNumber(),
            optionalNumber(),
            optionalNumber(),
            optionalNumber(),
            optionalNumber(),
            optionalNumber(),
            optionalNumber(),
            words()));
  }

  private List<String> words() {
    List<String> words = new ArrayList<>();
    for (int i = random.nextInt(4); i > 0; i--) {
      words.add(pick(WORDS));
    }
    return words;
  }

  private Optional<Measured> optional() {
    return random.nextBoolean() ? Optional.empty() : Optional.of(measured());
  }

  private Measured measured() {
    return new Measured(quantity(), optionalNumber());
  }

  private Quantity quantity() {
    return new Quantity(number(), unit());
  }

  private Unit unit() {
    List<String> symbols = Unit.symbols();
    return random.nextInt(5) > 0
        ? Unit.of(symbols.get(random.nextInt(symbols.size())))
        : new Unit("odd! unit " + random.nextInt(3), pick(Dimension.values()), number());
  }

  private OptionalDouble optionalNumber() {
    return random.nextInt(3) == 0 ? noDouble() : OptionalDouble.of(number());
  }

  private double number() {
    return switch (random.nextInt(3)) {
      case 0 -> random.nextInt(2_000) / 100.0;
      case 1 -> random.nextGaussian() * Math.pow(10, random.nextInt(30) - 15);
      default -> -0.0;
    };
  }

  private static <T> Optional<T> none() {
    return Optional.empty();
  }

  private static OptionalDouble noDouble() {
    return OptionalDouble.empty();
  }

  private <T> T pick(T[] values) {
    return values[random.nextInt(values.length)];
  }
}
