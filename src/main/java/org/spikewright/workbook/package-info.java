/**
 * Writes planned sheets to xlsx and csv, each complete under its name or absent. Start at {@link
 * org.spikewright.workbook.XlsxWriter} and {@link org.spikewright.workbook.CsvWriter}; {@link
 * org.spikewright.workbook.Aside} is the one place that makes a file appear.
 */
package org.spikewright.workbook;
