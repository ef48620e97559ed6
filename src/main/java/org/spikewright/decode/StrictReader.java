package org.spikewright.decode;

import java.io.IOException;
import java.io.InputStream;
import java.io.Reader;
import java.nio.ByteBuffer;
import java.nio.CharBuffer;
import java.nio.charset.CharsetDecoder;
import java.nio.charset.CoderResult;
import java.nio.charset.CodingErrorAction;
import java.util.Locale;

/**
 * Decodes bytes strictly: a byte that is no character, a NUL character, and a record that outgrows
 * its bound are faults that name their line. Nothing is replaced or skipped.
 */
final class StrictReader extends Reader {
  private static final int BYTES = 1 << 16;
  private static final int CHARS = 1 << 14;
  private static final String CHOICES =
      "UTF-8, windows-1252, ISO-8859-1, ISO-8859-15, UTF-16LE, UTF-16BE";

  private final TextFile file;
  private final InputStream in;
  private final CharsetDecoder decoder;
  private final ByteBuffer bytes = ByteBuffer.allocate(BYTES).limit(0);
  private final CharBuffer chars = CharBuffer.allocate(CHARS).limit(0);
  private final long mostRecordChars;

  /** Place in the file of the first byte in {@link #bytes}. */
  private long offset;

  private boolean ended;
  private boolean flushed;

  /** Line of the next character to be decoded, from 1. */
  private long line = 1;

  private char lastDecoded;
  private long recordLine = 1;
  private long recordChars;

  StrictReader(TextFile file, InputStream in, long mostRecordChars) {
    this.file = file;
    this.in = in;
    this.offset = file.markBytes();
    this.mostRecordChars = mostRecordChars;
    this.decoder =
        file.charset()
            .newDecoder()
            .onMalformedInput(CodingErrorAction.REPORT)
            .onUnmappableCharacter(CodingErrorAction.REPORT);
  }

  /** Tells that a record begins on a line; what was read before no longer counts for its size. */
  void recordBegins(long onLine) {
    recordLine = onLine;
    recordChars = 0;
  }

  @Override
  public int read(char[] to, int from, int length) {
    if (length == 0) {
      return 0;
    }
    if (!chars.hasRemaining() && !fill()) {
      return -1;
    }
    int count = Math.min(length, chars.remaining());
    chars.get(to, from, count);
    recordChars += count;
    if (recordChars > mostRecordChars) {
      throw tooLong();
    }
    return count;
  }

  @Override
  public void close() throws IOException {
    in.close();
  }

  private boolean fill() {
    chars.clear();
    while (chars.position() == 0 && !flushed) {
      CoderResult result = decoder.decode(bytes, chars, ended);
      if (result.isError() && chars.position() == 0) {
        throw undecodable(result.length());
      }
      // Characters before a bad byte go out first; it is met again on the next call.
      if (result.isUnderflow() && chars.position() == 0) {
        more();
      }
    }
    chars.flip();
    countLines();
    return chars.hasRemaining();
  }

  private void more() {
    if (ended) {
      decoder.flush(chars);
      flushed = true;
      return;
    }
    offset += bytes.position();
    bytes.compact();
    try {
      int count = in.read(bytes.array(), bytes.position(), bytes.remaining());
      ended = count < 0;
      bytes.position(bytes.position() + Math.max(count, 0));
    } catch (IOException e) {
      throw new DiskFailure(e);
    }
    bytes.flip();
  }

  private void countLines() {
    char[] decoded = chars.array();
    char before = lastDecoded;
    int end = chars.limit();
    for (int i = 0; i < end; i++) {
      char c = decoded[i];
      if (c <= '\r') {
        if (c == '\r' || c == '\n' && before != '\r') {
          line++;
        } else if (c == 0) {
          throw nul();
        }
      }
      before = c;
    }
    lastDecoded = before;
  }

  private Unreadable undecodable(int length) {
    StringBuilder found = new StringBuilder(length > 1 ? "bytes" : "byte");
    for (int i = 0; i < Math.min(length, bytes.remaining()); i++) {
      found.append(String.format(Locale.ROOT, " %02X", bytes.get(bytes.position() + i) & 0xFF));
    }
    return new Unreadable(
        "line " + line,
        found + " (byte " + (offset + bytes.position() + 1) + " of the file), no " + name(),
        "text in " + name() + ", " + file.how(),
        "declare the file's encoding in the mapping: one of " + CHOICES);
  }

  private Unreadable nul() {
    return new Unreadable(
        "line " + line,
        "a NUL character, which no table holds",
        "text in " + name() + ", " + file.how(),
        "if the file was still being copied, drop it again; if it is UTF-16 without a mark, declare"
            + " encoding UTF-16LE or UTF-16BE in the mapping; if it is no text file, export the"
            + " table as CSV or XLSX");
  }

  private Unreadable tooLong() {
    boolean severalLines = line > recordLine + 1;
    return new Unreadable(
        "line " + recordLine,
        "a row of more than "
            + mostRecordChars
            + " characters"
            + (severalLines ? ", over several lines: a quotation mark may never be closed" : ""),
        "rows of at most " + mostRecordChars + " characters",
        "look at that line in a text editor; export the table again with line ends, or remove the"
            + " lone quotation mark");
  }

  private String name() {
    return file.charset().name();
  }
}
