package org.spikewright.decode;

import java.io.IOException;
import java.io.InputStream;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.List;
import java.util.Locale;
import java.util.Map;

/** What a file is by its first bytes, whatever its name says. */
enum FileKind {
  EMPTY,
  /** A zip archive: XLSX, or something else that is packed in this way. */
  ZIP,
  /** A compound document: XLS, a protected XLSX, or something else. */
  COMPOUND,
  TEXT;

  private static final int HEAD = 512;
  private static final String COMPOUND_MARK =
      latin1(0xD0, 0xCF, 0x11, 0xE0, 0xA1, 0xB1, 0x1A, 0xE1);

  /** First bytes of kinds that exporting software offers beside tables. */
  private static final Map<String, String> FOREIGN =
      Map.of(
          "%PDF",
          "a PDF document",
          "{\\rtf",
          "a formatted text document (RTF)",
          latin1(0x1F, 0x8B),
          "a gzip archive",
          latin1('7', 'z', 0xBC, 0xAF),
          "a 7z archive",
          "Rar!",
          "a RAR archive",
          latin1(0x89, 'P', 'N', 'G'),
          "a picture",
          latin1(0xFF, 0xD8, 0xFF),
          "a picture");

  private static final List<String> MARKUP = List.of("<?xml", "<html", "<!doctype html", "<table");

  /**
   * Looks at the first bytes.
   *
   * @throws Unreadable for a kind that holds no table that can be read
   * @throws DiskFailure when the file cannot be opened or read
   */
  static FileKind of(Path file) {
    String head = head(file);
    if (head.isEmpty()) {
      return EMPTY;
    }
    if (head.startsWith("PK\u0003\u0004") || head.startsWith("PK\u0005\u0006")) {
      return ZIP;
    }
    if (head.startsWith(COMPOUND_MARK)) {
      return COMPOUND;
    }
    FOREIGN.forEach(
        (start, name) -> {
          if (head.startsWith(start)) {
            throw foreign(name);
          }
        });
    if (isMarkup(head)) {
      throw foreign("a web page or XML document saved under another name");
    }
    return TEXT;
  }

  /** The refusal of a kind that holds no table that can be read. */
  static Unreadable foreign(String name) {
    return new Unreadable(
        "the file",
        name,
        "a text file (CSV, TSV) or a workbook (XLSX, XLS)",
        "export the table as CSV or XLSX, or open the file and save it as XLSX, and drop it again");
  }

  private static String head(Path file) {
    try (InputStream in = Files.newInputStream(file)) {
      return new String(in.readNBytes(HEAD), StandardCharsets.ISO_8859_1);
    } catch (IOException e) {
      throw new DiskFailure(e);
    }
  }

  private static boolean isMarkup(String head) {
    // Byte-order marks and, for UTF-16, the zero halves of characters are passed over.
    String start = head.replaceAll("[\u00EF\u00BB\u00BF\u00FE\u00FF\u0000]", "").stripLeading();
    String lower = start.toLowerCase(Locale.ROOT);
    return MARKUP.stream().anyMatch(lower::startsWith);
  }

  private static String latin1(int... bytes) {
    StringBuilder text = new StringBuilder();
    for (int b : bytes) {
      text.append((char) b);
    }
    return text.toString();
  }
}
