package org.spikewright.workbook;

import java.nio.file.Path;

/** A file could not be written: the disk is full, the folder is gone, access is denied. */
public final class WriteFault extends Exception {
  private static final long serialVersionUID = 1L;

  private final transient Path path;

  WriteFault(Path path, Throwable cause) {
    super("cannot write " + path + ": " + reason(cause), cause);
    this.path = path;
  }

  /** The file that was to be written; nothing torn stands under this name. */
  public Path path() {
    return path;
  }

  private static String reason(Throwable cause) {
    Throwable deepest = cause;
    while (deepest.getCause() != null && deepest.getCause() != deepest) {
      deepest = deepest.getCause();
    }
    String message = deepest.getMessage();
    String kind = deepest.getClass().getSimpleName();
    return message == null ? kind : kind + ": " + message;
  }
}
