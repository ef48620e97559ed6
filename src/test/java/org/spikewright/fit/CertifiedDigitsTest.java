package org.spikewright.fit;

import static org.assertj.core.api.Assertions.assertThat;

import java.util.stream.Stream;
import org.apache.commons.csv.CSVRecord;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.MethodSource;
import org.spikewright.reference.ReferenceTable;

/**
 * The log relative error (the number of right digits) against the values that NIST certifies to 15
 * digits: NIST StRD, linear regression, Norris (line) and Pontius (parabola).
 */
class CertifiedDigitsTest {

  static Stream<CSVRecord> certified() {
    return ReferenceTable.rows("printed.csv").stream()
        .filter(row -> row.get("case").equals("LB01") || row.get("case").equals("LB04"));
  }

  @ParameterizedTest(name = "{0}")
  @MethodSource("certified")
  void a_certified_value_is_met_to_twelve_digits(CSVRecord row) {
    FittedCase ours = FittedCase.of(row.get("case"));
    String quantity = row.get("quantity");
    double value = quantity.equals("s**2") ? ours.get("s") * ours.get("s") : ours.get(quantity);
    double expected = ReferenceTable.number(row, "printed");
    double digits = -Math.log10(Math.max(Math.abs(value / expected - 1), 1e-15));
    assertThat(digits).as("%s %s: %s", row.get("case"), quantity, value).isGreaterThan(12);
  }
}
