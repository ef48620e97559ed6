package org.spikewright.judgement;

import org.spikewright.judgement.Flag.LimitSource;

/**
 * A limit that a flag holds a number against. Every limit is a default for the laboratory to
 * change.
 *
 * @param value the limit; its unit is that of the number it is held against
 * @param on whether the flag is raised at all
 * @param source where the limit comes from
 * @param reason why this value; shown in the workbook
 */
public record Limit(double value, boolean on, LimitSource source, String reason) {}
