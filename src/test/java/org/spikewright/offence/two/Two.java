package org.spikewright.offence.two;

import java.util.List;
import org.spikewright.offence.one.One;

/** The other half. */
public record Two(List<One> ones) {
  /** The first half. */
  public One first() {
    return ones.get(0);
  }
}
