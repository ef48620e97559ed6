package org.spikewright.table;

import java.util.Optional;

/**
 * The table a row stands in.
 *
 * @param file the file's name as a person sees it, relative to the watched folder
 * @param sheet the sheet's name; empty for text files
 */
public record Source(String file, Optional<String> sheet) {}
