package org.spikewright.quantity;

import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.assertThatThrownBy;
import static org.assertj.core.api.Assertions.within;

import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.junit.jupiter.params.provider.ValueSource;

class UnitTest {

  @ParameterizedTest(name = "{0} is printed {1}")
  @CsvSource({
    "ug/L,µg/L", "µg/L,µg/L", "μg/L,µg/L", "ug/l,µg/L", "mg / l,mg/L", "ml,mL", "l,L", "uL,µL",
    "µl,µL", "mol/l,mol/L", "mg/kg,mg/kg", "ug/ml,µg/mL", "mM,mM", "%,%", "kg/l,kg/L", "umol,µmol"
  })
  void knowsTheSpellingsOfAUnit(String written, String printed) {
    assertThat(Unit.find(written)).map(Unit::symbol).contains(printed);
  }

  @ParameterizedTest(name = "''{0}'' is no unit")
  @ValueSource(strings = {"", "ppm", "ppb", "mg/", "/L", "ML", "MG/L", "mg/L/L", "g L", "mgL", "x"})
  void refusesWhatIsNotInItsTable(String written) {
    assertThat(Unit.find(written)).isEmpty();
  }

  @ParameterizedTest(name = "1 {0} is {2} {1}")
  @CsvSource({
    "mL,µL,1000",
    "mg/L,µg/L,1000",
    "mg/L,µg/mL,1",
    "g/kg,%,",
    "µg/g,mg/kg,1",
    "mol/L,mM,1000",
    "%,1,0.01",
    "ng/mL,µg/L,1",
    "pg/µL,µg/L,1"
  })
  void convertsWithinADimension(String from, String to, Double factor) {
    if (factor == null) {
      assertThatThrownBy(() -> Unit.of(from).to(Unit.of(to)))
          .isInstanceOf(IllegalArgumentException.class)
          .hasMessageContaining("is a mass fraction")
          .hasMessageContaining("is a plain number");
    } else {
      assertThat(Unit.of(from).to(Unit.of(to))).isCloseTo(factor, within(1e-12 * factor));
    }
  }

  @Test
  void refusesToTurnMassIntoAmount() {
    assertThatThrownBy(() -> Unit.of("mg/L").to(Unit.of("mmol/L")))
        .isInstanceOf(IllegalArgumentException.class)
        .hasMessage("mg/L is a mass concentration, mmol/L is an amount concentration");
  }

  @Test
  void everySymbolIsFoundAgainAndFallsOnItself() {
    assertThat(Unit.symbols()).hasSizeGreaterThan(80);
    for (String symbol : Unit.symbols()) {
      assertThat(Unit.find(symbol)).map(Unit::symbol).contains(symbol);
    }
  }

  @Test
  void conversionThereAndBackChangesNothing() {
    for (String one : Unit.symbols()) {
      for (String other : Unit.symbols()) {
        Unit a = Unit.of(one);
        Unit b = Unit.of(other);
        if (a.dimension() == b.dimension()) {
          assertThat(a.to(b) * b.to(a)).as(one + " and " + other).isCloseTo(1, within(1e-12));
        }
      }
    }
  }
}
