package org.spikewright.table;

/**
 * Why a file could not be read as a whole.
 *
 * @param place {@code line 12}, {@code sheet Data, row 3}, or {@code the file}
 * @param found what stood there
 * @param expected what should have stood there
 * @param advice what the person at the bench can do
 */
public record DecodeFault(String place, String found, String expected, String advice) {}
