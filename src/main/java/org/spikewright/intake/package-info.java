/**
 * Finds files in the watched folder, waits until they stop changing, puts them under done or
 * rejected. Start at {@link org.spikewright.intake.Inbox}, whose every {@link
 * org.spikewright.intake.Look} says what is ready; {@link org.spikewright.intake.FileState} is what
 * a file goes through before that, {@link org.spikewright.intake.Archive} where it goes afterwards.
 * Nothing here writes to a source file.
 */
package org.spikewright.intake;
