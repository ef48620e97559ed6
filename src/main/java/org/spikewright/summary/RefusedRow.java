package org.spikewright.summary;

/**
 * One row that was not used, as the Refused rows sheet shows it.
 *
 * @param arrival the delivery's number
 * @param file as delivered
 * @param sheet empty for text files
 * @param row line or row, from 1
 * @param column from 1; 0 for the whole row
 * @param header the column's header or the fact's name; empty for the whole row
 * @param found what stood there
 * @param reason why, in short
 * @param expected what should have stood there
 */
public record RefusedRow(
    long arrival,
    String file,
    String sheet,
    long row,
    int column,
    String header,
    String found,
    String reason,
    String expected) {}
