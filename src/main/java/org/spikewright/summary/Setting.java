package org.spikewright.summary;

/**
 * One line of the Settings sheet.
 *
 * @param group such as {@code Program}, {@code Configuration}, {@code Limits}
 * @param name of the setting
 * @param value as a person reads it
 * @param origin where the value or limit comes from
 */
public record Setting(String group, String name, String value, String origin) {}
