package org.spikewright.demo;

import java.util.List;

/** Places on an estuary that does not exist. */
final class Sites {
  private static final List<String> NAMES =
      List.of(
          "Ottermere Quay",
          "Heron Sluice; left bank",
          "Wick Ferry steps",
          "Tidemill Pool",
          "Cinder Wharf",
          "Old Ropewalk outfall",
          "Greywater Lock, gate \"B\"",
          "Sandling Bar buoy 4",
          "Marl Pit drain",
          "Saltern Reach");

  private Sites() {}

  /** The site of a sample; the same each time. */
  static String of(String sample) {
    return NAMES.get(Math.floorMod(sample.hashCode(), NAMES.size()));
  }
}
