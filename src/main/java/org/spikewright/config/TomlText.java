package org.spikewright.config;

import java.io.IOException;
import java.nio.ByteBuffer;
import java.nio.charset.CharacterCodingException;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.Path;
import java.security.MessageDigest;
import java.security.NoSuchAlgorithmException;
import java.util.HexFormat;
import java.util.Optional;
import org.tomlj.Toml;
import org.tomlj.TomlParseError;
import org.tomlj.TomlParseResult;

/**
 * The text of a configuration file.
 *
 * @param text without a byte-order mark
 * @param sha256 of the bytes, in hexadecimal
 */
record TomlText(String text, String sha256) {

  /** The largest configuration file; more is somebody's export put in the wrong folder. */
  private static final long LARGEST = 1_000_000;

  static TomlText of(String text) {
    return new TomlText(text, sha256(text.getBytes(StandardCharsets.UTF_8)));
  }

  /** Reads a file; empty, with a fault added, when it cannot be read or is no UTF-8. */
  static Optional<TomlText> read(Path file, Faults faults) {
    try {
      if (!Files.isRegularFile(file)) {
        faults.torn(At.START, "no such file", "a configuration file");
        return Optional.empty();
      }
      if (Files.size(file) > LARGEST) {
        faults.torn(At.START, "a file of " + Files.size(file) + " bytes", "a text file below 1 MB");
        return Optional.empty();
      }
      byte[] bytes = Files.readAllBytes(file);
      String text = StandardCharsets.UTF_8.newDecoder().decode(ByteBuffer.wrap(bytes)).toString();
      return Optional.of(
          new TomlText(text.startsWith("\ufeff") ? text.substring(1) : text, sha256(bytes)));
    } catch (CharacterCodingException e) {
      faults.torn(At.START, "bytes that are not UTF-8", "a text saved as UTF-8");
    } catch (IOException e) {
      faults.torn(At.START, "a file that cannot be read (" + e + ")", "a readable file");
    }
    return Optional.empty();
  }

  /** Parses; faults of the syntax are added, and what could be read is returned all the same. */
  TomlParseResult parse(Faults faults) {
    TomlParseResult result = Toml.parse(text);
    for (TomlParseError error : result.errors()) {
      String message = error.getMessage();
      boolean again = message.contains("previously defined");
      faults.torn(
          At.of(error.position()),
          message,
          again ? "each key and each [section] once" : "TOML, as in the commented examples");
    }
    return result;
  }

  private static String sha256(byte[] bytes) {
    try {
      return HexFormat.of().formatHex(MessageDigest.getInstance("SHA-256").digest(bytes));
    } catch (NoSuchAlgorithmException e) {
      throw new IllegalStateException("every Java has SHA-256", e);
    }
  }
}
