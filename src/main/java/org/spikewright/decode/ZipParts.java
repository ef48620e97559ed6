package org.spikewright.decode;

import java.io.ByteArrayOutputStream;
import java.io.IOException;
import java.io.InputStream;
import java.io.OutputStream;
import java.nio.charset.StandardCharsets;
import java.nio.file.Path;
import java.util.HashSet;
import java.util.Set;
import java.util.TreeMap;
import java.util.zip.CRC32;
import java.util.zip.ZipEntry;
import java.util.zip.ZipFile;

/**
 * The parts of a packed workbook. The zip library of the platform does not compare check sums when
 * it reads from a file: here no part is used before its CRC-32 was.
 */
final class ZipParts implements AutoCloseable {
  private static final String ADVICE =
      "copy the file again from where it was made, or open it in a spreadsheet program and save it"
          + " anew, and drop it again";

  private final ZipFile zip;

  /** Part names do not differ by case alone. */
  private final TreeMap<String, ZipEntry> entries = new TreeMap<>(String.CASE_INSENSITIVE_ORDER);

  private final Set<ZipEntry> doubled = new HashSet<>();

  ZipParts(Path file) throws IOException {
    ZipEnd.check(file);
    // Any byte is a character here: a name in another encoding must not spoil the other entries.
    this.zip = new ZipFile(file.toFile(), StandardCharsets.ISO_8859_1);
    zip.stream()
        .forEach(
            entry -> {
              ZipEntry before = entries.putIfAbsent(entry.getName(), entry);
              if (before != null) {
                doubled.add(before);
              }
            });
  }

  boolean has(String name) {
    return entries.containsKey(name);
  }

  boolean hasAnyUnder(String folder) {
    String first = entries.ceilingKey(folder);
    return first != null && first.regionMatches(true, 0, folder, 0, folder.length());
  }

  /**
   * A part as a whole, for those that are small in every workbook.
   *
   * @throws Unreadable when it is missing, too large or not what its check sum says
   */
  byte[] whole(String name) throws IOException {
    ByteArrayOutputStream bytes = new ByteArrayOutputStream();
    copyChecked(name, Limits.SMALL_PART_BYTES, bytes);
    return bytes.toByteArray();
  }

  /**
   * Unpacks a part, keeps nothing, and compares its check sum.
   *
   * @throws Unreadable when it is missing, too large or not what its check sum says
   */
  void check(String name) throws IOException {
    copyChecked(name, Limits.LARGE_PART_BYTES, OutputStream.nullOutputStream());
  }

  /** A part as a stream. Call {@link #check} before. */
  InputStream stream(String name) throws IOException {
    return zip.getInputStream(entry(name));
  }

  private ZipEntry entry(String name) {
    ZipEntry entry = entries.get(name);
    if (entry == null) {
      throw new Unreadable(
          "the file",
          "no part " + Shown.quoted(name) + ", which the workbook needs",
          "a whole XLSX file",
          ADVICE);
    }
    if (doubled.contains(entry)) {
      throw new Unreadable(
          "the file", "two parts of the name " + Shown.quoted(name), "one part of a name", ADVICE);
    }
    return entry;
  }

  private void copyChecked(String name, long mostBytes, OutputStream to) throws IOException {
    ZipEntry entry = entry(name);
    CRC32 sum = new CRC32();
    byte[] buffer = new byte[1 << 16];
    long total = 0;
    try (InputStream in = zip.getInputStream(entry)) {
      for (int count = in.read(buffer); count >= 0; count = in.read(buffer)) {
        total += count;
        checkSize(entry, total, mostBytes);
        sum.update(buffer, 0, count);
        to.write(buffer, 0, count);
      }
    }
    if (sum.getValue() != entry.getCrc()) {
      throw new Unreadable(
          "the file",
          "damaged content: the check sum of its part " + Shown.quoted(name) + " is wrong",
          "content that agrees with the check sum (CRC-32) stored beside it",
          ADVICE);
    }
  }

  private static void checkSize(ZipEntry entry, long total, long mostBytes) {
    boolean bomb =
        total > Limits.RATIO_FROM_BYTES && total / Limits.RATIO > entry.getCompressedSize();
    if (total > mostBytes || bomb) {
      throw new Unreadable(
          "the file",
          "a part "
              + Shown.quoted(entry.getName())
              + " that unpacks to more than "
              + total
              + " bytes from "
              + entry.getCompressedSize(),
          "at most " + mostBytes + " bytes, and at most " + Limits.RATIO + " times the packed size",
          "split the table into several files, or export it as CSV");
    }
  }

  @Override
  public void close() throws IOException {
    zip.close();
  }
}
