/**
 * Turns one CSV or spreadsheet file into a stream of rows with positions, giving no meaning to any.
 * Start at {@link org.spikewright.decode.FileDecoder}, which picks the kind by content and is the
 * one place that catches what a file provokes; then {@link org.spikewright.decode.CsvDecoder},
 * {@code XlsxDecoder} and {@code XlsDecoder}. What bounds memory and time stands in {@code Limits}.
 */
package org.spikewright.decode;
