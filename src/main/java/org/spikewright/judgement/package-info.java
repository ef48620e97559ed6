/**
 * Holds a fitted series against the criteria; each departure is a flag with its numbers. Start at
 * {@link org.spikewright.judgement.Judge}.
 */
package org.spikewright.judgement;
