package org.spikewright.summary;

import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.assertThatThrownBy;

import java.util.ArrayList;
import java.util.List;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;
import org.spikewright.judgement.Outcome;
import org.spikewright.judgement.SeriesResult;
import org.spikewright.judgement.Verdict;
import org.spikewright.testkit.Nights;

class ResultColumnsTest {

  @Test
  void everyResultOfANightReadsBackAsTheSame() {
    List<ResultRow> rows = new ArrayList<>();
    Nights.small().results().forEach(rows::add);
    assertThat(rows).hasSize(12);
    for (ResultRow row : rows) {
      List<String> fields = ResultColumns.fields(row);
      assertThat(fields).hasSameSizeAs(ResultColumns.NAMES);
      assertThat(ResultColumns.row(fields)).isEqualTo(row);
    }
  }

  @Test
  void theDocumentedColumnsComeFirstAndInOrder() {
    String documented =
        "lab_day,batch,sample,analyte,value,unit,reported,standard_uncertainty,"
            + "expanded_uncertainty,coverage_factor,lower95,upper95,own_standard_error,own_lower95,"
            + "own_upper95,interval_basis,detection_limit,verdict,flags,flasks,readings,slope,"
            + "signal_intercept,residual_sd,residual_df,r,design,instrument,preparation,source_files";
    assertThat(String.join(",", ResultColumns.NAMES)).startsWith(documented + ",");
  }

  @Test
  void aStraightSeriesFillsItsRowFromTheFit() {
    Outcome outcome = Nights.water("BW-1", "Pb", 12.4, Nights.Shape.STRAIGHT);
    SeriesResult result = outcome.result().orElseThrow();
    ResultRow row = ResultRow.of(outcome);
    assertThat(row.value()).hasValue(result.value());
    assertThat(row.unit()).isEqualTo("µg/L");
    assertThat(row.lower95()).isEqualTo(result.lower95()).isEqualTo(row.ownLower95());
    assertThat(row.ownStandardError()).isEqualTo(result.standardError());
    assertThat(row.intervalBasis()).isEqualTo("own");
    assertThat(row.standardUncertainty()).isEqualTo(result.standardError());
    assertThat(row.slope()).hasValue(result.line().slope());
    assertThat(row.residualDf()).hasValue(3);
    assertThat(row.flasks()).isEqualTo(5);
    assertThat(row.readings()).isEqualTo(10);
    assertThat(row.design()).isEqualTo("made up");
    assertThat(row.sourceFiles()).containsExactly("furnace/run-0115.csv");
    assertThat(row.verdict()).isEqualTo(Verdict.REPORT);
  }

  @Test
  void readingsWithoutASeriesMakeARowWithoutNumbers() {
    ResultRow row = ResultRow.of(Nights.ungrouped("BW-2", "Cd"));
    assertThat(row.value()).isEmpty();
    assertThat(row.unit()).isEmpty();
    assertThat(row.intervalBasis()).isEmpty();
    assertThat(row.flasks()).isZero();
    assertThat(row.readings()).isEqualTo(2);
    assertThat(row.flags()).contains("no-series");
    assertThat(row.sentences()).hasSameSizeAs(row.flags());
  }

  @Test
  void twoFlasksHaveNoInterval() {
    ResultRow row = ResultRow.of(Nights.water("BW-3", "Zn", 9, Nights.Shape.TWO_FLASKS));
    assertThat(row.value()).isPresent();
    assertThat(row.lower95()).isEmpty();
    assertThat(row.intervalBasis()).isEmpty();
  }

  @ParameterizedTest
  @ValueSource(strings = {"a", "a;b", "a\\", "\\;", ";", "a\nb", "a\\;b;c"})
  void anItemOfAListReadsBackWhateverItHolds(String item) {
    List<String> items = List.of(item, "other", item);
    assertThat(ResultColumns.split(ResultColumns.join(items))).isEqualTo(items);
  }

  @Test
  void anEmptyListIsAnEmptyField() {
    assertThat(ResultColumns.join(List.of())).isEmpty();
    assertThat(ResultColumns.split("")).isEmpty();
  }

  @Test
  void aRowOfAnotherShapeIsRefused() {
    assertThatThrownBy(() -> ResultColumns.row(List.of("2025-01-15")))
        .isInstanceOf(IllegalArgumentException.class)
        .hasMessageContaining("1 fields, not 47");
  }
}
