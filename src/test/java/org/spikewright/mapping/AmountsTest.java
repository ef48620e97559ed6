package org.spikewright.mapping;

import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.within;

import java.util.Map;
import java.util.Optional;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.spikewright.mapping.Rejection.Reason;
import org.spikewright.quantity.Dimension;
import org.spikewright.quantity.Measured;
import org.spikewright.quantity.NumberGrammar;
import org.spikewright.quantity.Unit;
import org.spikewright.table.Cell;

class AmountsTest {
  private final AmountReader reader = new AmountReader(Notation.PLAIN);

  @ParameterizedTest(name = "{0} ''{1}'' with column unit {2}: {3}")
  @CsvSource(
      nullValues = "-",
      value = {
        "aliquot_volume,20 mL,-,20 mL",
        "aliquot_volume,20 mL ± 0.03 mL,-,20 mL ± 0.03 mL",
        "aliquot_volume,20 mL ± 0.03,-,20 mL ± 0.03 mL",
        "aliquot_volume,20 mL ± 30 µL,-,20 mL ± 0.03 mL",
        "aliquot_volume,20,mL,20 mL",
        "aliquot_volume,20µL,mL,20 µL",
        "stock,1e-2 mg/L,-,0.01 mg/L",
        "stock,10 ug / ml,-,10 µg/mL",
        "dry_mass,85,%,0.85",
        "dry_mass,0.85,1,0.85",
        "dry_mass,85 %,-,0.85",
        "dry_mass,85 % ± 1 %,-,0.85 ± 0.01",
        "dry_mass,85 ± 1,%,0.85 ± 0.01",
        "addition_volume,1 mL ± 0.1,-,1 mL ± 0.1 mL",
        "test_portion,0.5012 g ± 0.2 mg,-,0.5012 g ± 0.0002 g",
        "baseline,-0.5,-,-0.5",
        "addition_volume,0,µL,0 µL",
        "method_blank,-0.1 µg/L,-,-0.1 µg/L"
      })
  void readsQuantities(String word, String text, String unit, String read) {
    Understood<Measured> found = reader.read(Fact.of(word).get(), new Cell.Text(text), unit(unit));
    assertThat(found).isInstanceOf(Understood.Value.class);
    assertThat(((Understood.Value<Measured>) found).value()).hasToString(read);
  }

  @ParameterizedTest(name = "{0} ''{1}'' with column unit {2} is refused: {3}")
  @CsvSource(
      nullValues = "-",
      value = {
        "aliquot_volume,20,-,UNIT_DOES_NOT_FIT",
        "aliquot_volume,20 mg,-,UNIT_DOES_NOT_FIT",
        "aliquot_volume,20 ppm,-,UNIT_DOES_NOT_FIT",
        "aliquot_volume,0 mL,-,OUT_OF_BOUNDS",
        "addition_volume,-1,mL,OUT_OF_BOUNDS",
        "baseline,1 ± 0.1,-,OUT_OF_BOUNDS",
        "aliquot_volume,twenty mL,-,NOT_A_NUMBER",
        "aliquot_volume,'2,5 mL',-,UNIT_DOES_NOT_FIT",
        "aliquot_volume,20 mL ± x,-,NOT_A_NUMBER",
        "aliquot_volume,20 mL ± 1 g,-,NOT_A_NUMBER",
        "aliquot_volume,20 mL ± -1 mL,-,NOT_A_NUMBER",
        "aliquot_volume,NaN mL,-,NOT_A_NUMBER",
        "dry_mass,0,%,OUT_OF_BOUNDS",
        "dry_mass,101,%,OUT_OF_BOUNDS",
        "dry_mass,85,1,OUT_OF_BOUNDS",
        "stock,1 mL,-,UNIT_DOES_NOT_FIT"
      })
  void refusesWhatIsNotOne(String word, String text, String unit, Reason reason) {
    Understood<Measured> found = reader.read(Fact.of(word).get(), new Cell.Text(text), unit(unit));
    assertThat(found).isInstanceOf(Understood.Nothing.class);
    assertThat(((Understood.Nothing<Measured>) found).reason()).isEqualTo(reason);
    assertThat(((Understood.Nothing<Measured>) found).expected()).isNotBlank();
  }

  private static Optional<Unit> unit(String symbol) {
    return symbol == null ? Optional.empty() : Unit.find(symbol);
  }

  @Test
  void aStoredNumberNeedsADeclaredUnit() {
    Cell cell = new Cell.Number(2.5, "2.5");
    assertThat(reader.read(Fact.ALIQUOT_VOLUME, cell, Optional.empty()))
        .isInstanceOf(Understood.Nothing.class);
    assertThat(reader.read(Fact.ALIQUOT_VOLUME, cell, Unit.find("mL")))
        .isInstanceOf(Understood.Value.class);
  }

  @Test
  void ppmMeansWhatTheMappingSays() {
    Notation declared =
        new Notation(NumberGrammar.COMMA, Map.of("ppm", Unit.of("mg/L")), Optional.empty());
    Understood<Measured> found =
        new AmountReader(declared).read(Fact.STOCK, "2,5 ppm", Optional.empty());
    assertThat(((Understood.Value<Measured>) found).value()).hasToString("2.5 mg/L");
  }

  @ParameterizedTest(name = "dilution ''{0}'', 1:10 meaning {1}: {2}")
  @CsvSource({
    "10,-,10",
    "1,-,1",
    "1 + 9,-,10",
    "1+9,-,10",
    "2 + 3,-,2.5",
    "1 mL to 10 mL,-,10",
    "500 µL to 10 mL,-,20",
    "1:10,part in total,10",
    "1:10,part plus part,11",
    "2:5,part in total,2.5",
    "1e2,-,100",
    "1e+2,-,100"
  })
  void readsDilutions(String text, String ratio, double factor) {
    Understood<Measured> found = new DilutionReader(withRatio(ratio)).read(text);
    assertThat(found).isInstanceOf(Understood.Value.class);
    assertThat(((Understood.Value<Measured>) found).value().quantity().value())
        .isCloseTo(factor, within(1e-12 * factor));
  }

  @ParameterizedTest(name = "dilution ''{0}'', 1:10 meaning {1}, is refused: {2}")
  @CsvSource({
    "1:10,-,NOT_A_NUMBER", "0.5,-,OUT_OF_BOUNDS", "0,-,OUT_OF_BOUNDS",
        "10 mL to 1 mL,-,OUT_OF_BOUNDS",
    "1 mL to 10 g,-,NOT_A_NUMBER", "x,-,NOT_A_NUMBER", "0 + 9,-,NOT_A_NUMBER",
        "1 + -9,-,NOT_A_NUMBER",
    "10:1,part in total,OUT_OF_BOUNDS", "0:1,part in total,NOT_A_NUMBER", "NaN,-,NOT_A_NUMBER"
  })
  void refusesOtherDilutions(String text, String ratio, Reason reason) {
    Understood<Measured> found = new DilutionReader(withRatio(ratio)).read(text);
    assertThat(found).isInstanceOf(Understood.Nothing.class);
    assertThat(((Understood.Nothing<Measured>) found).reason()).isEqualTo(reason);
  }

  private static Notation withRatio(String word) {
    Optional<Notation.Ratio> ratio =
        java.util.Arrays.stream(Notation.Ratio.values())
            .filter(each -> each.word().equals(word))
            .findFirst();
    return new Notation(NumberGrammar.POINT, Map.of(), ratio);
  }

  @ParameterizedTest(name = "added {0}, portion {1}, result {2}: {3}")
  @CsvSource(
      nullValues = "-",
      value = {
        "mg/L,-,µg/L,-",
        "mg/L,g,mg/kg,-",
        "mmol/L,g,mmol/kg,-",
        "mg/L,mL,µg/L,-",
        "mg/kg,-,mg/kg,-",
        "mg/L,-,mg/kg,test_portion",
        "mg/L,-,mmol/L,molar mass",
        "mmol/L,g,mg/kg,molar mass",
        "mg/L,g,mg/L,a mass fraction",
        "mg/kg,g,mg/kg,per volume"
      })
  void knowsWhichUnitsLeadToTheResult(String added, String portion, String result, String why) {
    Optional<String> fault =
        new Chain(unit(portion).map(Unit::dimension), false, false)
            .fault(Unit.of(added).dimension(), Unit.of(result).dimension());
    if (why == null) {
      assertThat(fault).isEmpty();
    } else {
      assertThat(fault).isPresent();
      assertThat(fault.get()).contains(why);
    }
  }

  @Test
  void everyFactThatIsAQuantityFitsSomeDimension() {
    for (Fact fact : Fact.values()) {
      if (fact.kind() == Fact.Kind.AMOUNT) {
        assertThat(java.util.Arrays.stream(Dimension.values()).anyMatch(fact::fits))
            .as(fact.word())
            .isTrue();
      }
    }
  }
}
