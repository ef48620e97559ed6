package org.spikewright.fit;

/** How the flasks of a pool's lines weigh; decided by the method, never series by series. */
public enum Weighting {
  /** All flasks weigh the same. */
  EQUAL,
  /** Inverse to the variance that the pool's flask noise function gives. */
  BY_NOISE
}
