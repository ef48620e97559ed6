package org.spikewright.summary;

import static org.assertj.core.api.Assertions.assertThat;

import java.util.List;
import org.junit.jupiter.api.Test;
import org.spikewright.judgement.Outcome;
import org.spikewright.testkit.Nights;

class FlaskColumnsTest {

  private static String field(List<String> line, String name) {
    return line.get(FlaskColumns.NAMES.indexOf(name));
  }

  @Test
  void everyFlaskHasOneLineWithItsResidual() {
    Outcome outcome = Nights.water("BW-1", "Pb", 12.4, Nights.Shape.STRAIGHT);
    List<List<String>> lines = FlaskColumns.lines(outcome);
    assertThat(lines).hasSize(5);
    for (List<String> line : lines) {
      assertThat(line).hasSameSizeAs(FlaskColumns.NAMES);
      double signal = Double.parseDouble(field(line, "signal_used"));
      double fitted = Double.parseDouble(field(line, "fitted"));
      double residual = Double.parseDouble(field(line, "residual"));
      assertThat(signal - fitted)
          .isCloseTo(residual, org.assertj.core.api.Assertions.within(1e-12));
      assertThat(field(line, "used")).isEqualTo("yes");
      assertThat(field(line, "why_not")).isEmpty();
      assertThat(field(line, "stock")).isEqualTo("5 mg/L");
    }
    assertThat(field(lines.get(1), "addition")).isEqualTo("20");
    assertThat(field(lines.get(1), "addition_unit")).isEqualTo("µL");
    assertThat(field(lines.get(1), "source_cells")).isEqualTo("line 5, column 6;line 6, column 6");
  }

  @Test
  void aFlaskWithoutANumberSaysWhyItWasNotUsed() {
    Outcome outcome = Nights.water("BW-1", "Cd", 6, Nights.Shape.OVER_RANGE);
    List<String> last = FlaskColumns.lines(outcome).get(4);
    assertThat(field(last, "used")).isEqualTo("no");
    assertThat(field(last, "why_not")).isEqualTo("no reading is a number: over range");
    assertThat(field(last, "mean_signal")).isEmpty();
    assertThat(field(last, "signal_used")).isEmpty();
    assertThat(field(last, "readings")).isEqualTo("0");
  }

  @Test
  void readingsThatFormNoSeriesStandThereToo() {
    List<List<String>> lines = FlaskColumns.lines(Nights.ungrouped("BW-2", "Cd"));
    assertThat(lines).hasSize(1);
    assertThat(field(lines.get(0), "used")).isEqualTo("no");
    assertThat(field(lines.get(0), "why_not")).startsWith("no series: flask F1");
    assertThat(field(lines.get(0), "readings")).isEqualTo("2");
  }
}
