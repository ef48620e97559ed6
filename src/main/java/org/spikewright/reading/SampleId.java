package org.spikewright.reading;

import java.text.Normalizer;

/**
 * A sample's identifier. Compared after trimming and Unicode NFC; case and inner blanks count.
 *
 * @param text trimmed and in NFC
 */
public record SampleId(String text) implements Comparable<SampleId> {
  /** Trims and normalises. */
  public SampleId {
    text = Normalizer.normalize(text.strip(), Normalizer.Form.NFC);
  }

  @Override
  public int compareTo(SampleId other) {
    return text.compareTo(other.text);
  }

  @Override
  public String toString() {
    return text;
  }
}
