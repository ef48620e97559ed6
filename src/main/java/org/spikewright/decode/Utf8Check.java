package org.spikewright.decode;

import java.io.IOException;
import java.io.InputStream;
import java.nio.ByteBuffer;
import java.nio.CharBuffer;
import java.nio.charset.CharsetDecoder;
import java.nio.charset.CoderResult;
import java.nio.charset.CodingErrorAction;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.function.IntPredicate;

/**
 * Tells whether a whole file is UTF-8 by its bytes. Text of another encoding that holds a letter
 * beyond ASCII practically never is; text without one says nothing.
 */
final class Utf8Check {
  private static final int BYTES = 1 << 16;

  private Utf8Check() {}

  /**
   * Whether at least one character takes several bytes and all are valid. A NUL is in no table, and
   * in nearly every one that is UTF-16. Stops at the first byte that decides.
   */
  static boolean holdsUtf8(Path path) {
    CharsetDecoder decoder =
        StandardCharsets.UTF_8
            .newDecoder()
            .onMalformedInput(CodingErrorAction.REPORT)
            .onUnmappableCharacter(CodingErrorAction.REPORT);
    ByteBuffer bytes = ByteBuffer.allocate(BYTES);
    CharBuffer chars = CharBuffer.allocate(BYTES);
    boolean beyondAscii = false;
    try (InputStream in = Files.newInputStream(path)) {
      int count = 0;
      while (count >= 0) {
        count = in.read(bytes.array(), bytes.position(), bytes.remaining());
        bytes.position(bytes.position() + Math.max(count, 0)).flip();
        CoderResult result = decoder.decode(bytes, chars.clear(), count < 0);
        if (result.isError() || any(chars.flip(), c -> c == 0)) {
          return false;
        }
        beyondAscii |= any(chars, c -> c > 0x7F);
        bytes.compact();
      }
    } catch (IOException e) {
      throw new DiskFailure(e);
    }
    return beyondAscii;
  }

  private static boolean any(CharBuffer chars, IntPredicate what) {
    char[] decoded = chars.array();
    for (int i = 0; i < chars.limit(); i++) {
      if (what.test(decoded[i])) {
        return true;
      }
    }
    return false;
  }
}
