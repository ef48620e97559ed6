package org.spikewright.decode;

import java.io.BufferedReader;
import java.io.IOException;
import java.io.Reader;
import java.io.UncheckedIOException;

/**
 * Finds out what is wrong with the quotation marks of a record, by a second reading of it: the CSV
 * library tells neither the line of an open mark nor what followed a closing one.
 */
final class QuoteTrouble {
  private enum State {
    FIELD_START,
    UNQUOTED,
    QUOTED,
    BEHIND_QUOTED,
    BEHIND_BLANK
  }

  private final char separator;
  private final char quote;
  private State state = State.FIELD_START;
  private long line = 1;
  private long openedOn = 1;

  QuoteTrouble(char separator, char quote) {
    this.separator = separator;
    this.quote = quote;
  }

  /** The fault of the record that begins on a line. */
  Unreadable explained(TextFile file, long recordLine) {
    try (Reader in = new BufferedReader(file.open(Long.MAX_VALUE))) {
      int before = 0;
      for (int c = in.read(); c >= 0; c = in.read()) {
        boolean endsLine = c == '\r' || c == '\n' && before != '\r';
        if (line >= recordLine && !step((char) c)) {
          return textBehind((char) c);
        }
        line += endsLine ? 1 : 0;
        before = c;
      }
    } catch (IOException e) {
      throw new UncheckedIOException(e);
    }
    return neverClosed();
  }

  /** Follows one character; false when text stands behind a closing mark. */
  private boolean step(char c) {
    boolean endsField = c == separator || c == '\r' || c == '\n';
    switch (state) {
      case FIELD_START, UNQUOTED -> {
        boolean opens = c == quote && state == State.FIELD_START && !endsField;
        openedOn = opens ? line : openedOn;
        state = opens ? State.QUOTED : endsField ? State.FIELD_START : State.UNQUOTED;
      }
      case QUOTED -> state = c == quote ? State.BEHIND_QUOTED : State.QUOTED;
      case BEHIND_QUOTED, BEHIND_BLANK -> {
        if (endsField) {
          state = State.FIELD_START;
        } else if (c == quote && state == State.BEHIND_QUOTED) {
          state = State.QUOTED;
        } else {
          state = State.BEHIND_BLANK;
          return Character.isWhitespace(c);
        }
      }
    }
    return true;
  }

  private Unreadable textBehind(char c) {
    return new Unreadable(
        "line " + line,
        "the character " + c + " behind the closing quotation mark of a field",
        "a separator or the end of the line behind a closing " + quote,
        "double each " + quote + " that belongs to the text, or export the table again");
  }

  private Unreadable neverClosed() {
    return new Unreadable(
        "line " + openedOn,
        "a " + quote + " that opens a field and is never closed",
        "a closing " + quote + " before the end of the file",
        "if the file was still being written, drop it again when it is whole; else remove the lone "
            + quote
            + " in a text editor, or declare another quote in the mapping");
  }
}
