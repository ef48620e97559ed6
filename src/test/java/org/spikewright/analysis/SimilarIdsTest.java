package org.spikewright.analysis;

import static org.assertj.core.api.Assertions.assertThat;

import java.util.List;
import org.junit.jupiter.api.Test;
import org.spikewright.judgement.Flag;
import org.spikewright.reading.SampleId;

class SimilarIdsTest {

  private static SimilarIds of(String... ids) {
    SimilarIds similar = new SimilarIds();
    List.of(ids).forEach(id -> similar.add(new SampleId(id)));
    return similar;
  }

  @Test
  void idsThatDifferInCaseOrBlanksAreNotedOnBothSides() {
    SimilarIds similar = of("BW 12", "bw12", "BW-12", "BW12");
    Flag flag = similar.flagFor(new SampleId("bw12")).orElseThrow();
    assertThat(flag.weight()).isEqualTo(Flag.Weight.NOTE);
    assertThat(flag.sentence())
        .isEqualTo("The ID 'bw12' differs only in case or blanks from 'BW 12', 'BW12'.");
    assertThat(similar.flagFor(new SampleId("BW 12"))).isPresent();
    assertThat(similar.flagFor(new SampleId("BW-12"))).isEmpty();
  }

  @Test
  void oneIdAloneIsNotedNever() {
    assertThat(of("BW 12", "BW 12", " BW 12 ").flagFor(new SampleId("BW 12"))).isEmpty();
  }

  @Test
  void theLettersOfOneLanguageDoNotCountAsCaseOfAnother() {
    assertThat(of("Stra\u00dfe", "STRASSE").flagFor(new SampleId("STRASSE"))).isPresent();
    assertThat(of("I1", "\u01311").flagFor(new SampleId("I1"))).isPresent();
  }
}
