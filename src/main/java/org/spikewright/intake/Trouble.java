package org.spikewright.intake;

import java.io.IOException;
import java.nio.file.AccessDeniedException;
import java.nio.file.DirectoryNotEmptyException;
import java.nio.file.FileAlreadyExistsException;
import java.nio.file.FileSystemException;
import java.nio.file.FileSystemLoopException;
import java.nio.file.NoSuchFileException;
import java.nio.file.NotDirectoryException;

/** What a file system's exception says, in the words of a sentence. */
final class Trouble {
  private Trouble() {}

  static String words(IOException trouble) {
    if (trouble instanceof AccessDeniedException) {
      return "permission denied";
    }
    if (trouble instanceof NoSuchFileException) {
      return "nothing is there";
    }
    if (trouble instanceof NotDirectoryException) {
      return "it is not a folder";
    }
    if (trouble instanceof FileAlreadyExistsException) {
      return "something is there already";
    }
    if (trouble instanceof DirectoryNotEmptyException) {
      return "a folder that is not empty is there";
    }
    if (trouble instanceof FileSystemLoopException) {
      return "links run in a circle";
    }
    if (trouble instanceof FileSystemException named && named.getReason() != null) {
      return ShownName.of(named.getReason());
    }
    String message = trouble.getMessage();
    return ShownName.of(message == null ? trouble.getClass().getSimpleName() : message);
  }
}
