package org.spikewright.summary;

/**
 * A column of a sheet.
 *
 * @param title its header; empty where the sheet is no table
 * @param width in characters, 1 to 255
 */
public record ColumnPlan(String title, int width) {}
