/**
 * One reading of one flask: whose sample, what was added, what signal, from which cell. Start at
 * {@link org.spikewright.reading.Reading}, then {@link org.spikewright.reading.FlaskFacts}.
 */
package org.spikewright.reading;
