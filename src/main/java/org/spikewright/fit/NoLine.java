package org.spikewright.fit;

/**
 * No line can be fitted.
 *
 * @param reason in plain words
 */
public record NoLine(String reason) implements LineOutcome {}
