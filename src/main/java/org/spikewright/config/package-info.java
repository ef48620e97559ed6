/**
 * Reads the configuration and the mappings and reports every fault at once, with file, line and
 * column. Start at {@link org.spikewright.config.Settings} and {@link
 * org.spikewright.config.MappingFolder}; {@link org.spikewright.config.ConfigFault} is what goes
 * wrong.
 */
package org.spikewright.config;
