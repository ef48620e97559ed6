package org.spikewright.intake;

import java.nio.file.Path;

/** What became of an attempt to file a file away. */
public sealed interface Filed {

  /** It lies under the target, bytes unchanged, and no longer in the watched folder. */
  record Moved(Path to) implements Filed {}

  /**
   * What was to be filed is no longer what lies in the watched folder: it was replaced, changed or
   * taken away. Whatever lies there is a new delivery.
   */
  record Withdrawn(String why) implements Filed {}

  /** Something else lies under the target and stays; the file needs another name. */
  record Occupied(String why) implements Filed {}

  /** It could not be done now. The file still counts once; the same call is to be made again. */
  record Failed(String why) implements Filed {}
}
