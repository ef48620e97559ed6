package org.spikewright.reading;

import static org.assertj.core.api.Assertions.assertThat;

import org.junit.jupiter.api.Test;

class SampleIdTest {

  @Test
  void blanksAroundItAndItsUnicodeFormDoNotCount() {
    assertThat(new SampleId("  Mu\u0308-17\u2003")).isEqualTo(new SampleId("M\u00fc-17"));
    assertThat(new SampleId("\tW 1 ").text()).isEqualTo("W 1");
  }

  @Test
  void caseAndBlanksInsideCount() {
    assertThat(new SampleId("W-1")).isNotEqualTo(new SampleId("w-1"));
    assertThat(new SampleId("W 1")).isNotEqualTo(new SampleId("W  1"));
  }

  @Test
  void itIsOrderedByItsText() {
    assertThat(new SampleId("A")).isLessThan(new SampleId("B"));
    assertThat(new SampleId("A2").compareTo(new SampleId(" A2"))).isZero();
  }
}
