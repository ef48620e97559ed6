package org.spikewright.decode;

import java.io.IOException;
import java.io.InputStream;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.List;
import org.apache.poi.EncryptedDocumentException;
import org.apache.poi.hssf.record.Record;
import org.apache.poi.hssf.record.RecordFactoryInputStream;
import org.apache.poi.poifs.filesystem.DirectoryNode;
import org.apache.poi.poifs.filesystem.POIFSFileSystem;
import org.spikewright.table.RowSink;
import org.spikewright.table.SheetRule;

/** Reads XLS workbooks of the editions from 1997 on, record by record. */
final class XlsDecoder {
  private XlsDecoder() {}

  /** Hands the rows on, after the list of sheets is known. */
  static void read(Path file, String shownName, List<SheetRule> wanted, RowSink sink)
      throws IOException {
    checkSize(file);
    try (POIFSFileSystem compound = new POIFSFileSystem(file.toFile(), true)) {
      DirectoryNode root = compound.getRoot();
      try (InputStream stream = root.createDocumentInputStream(workbookEntry(root))) {
        follow(stream, new XlsBook(shownName, wanted, sink));
      } catch (EncryptedDocumentException e) {
        throw isProtected();
      }
    }
  }

  private static void follow(InputStream stream, XlsBook book) {
    RecordFactoryInputStream records = new RecordFactoryInputStream(stream, false);
    for (Record record = records.nextRecord(); record != null; record = records.nextRecord()) {
      if (!book.follow(record)) {
        return;
      }
    }
    book.checkWhole();
  }

  private static String workbookEntry(DirectoryNode root) {
    if (root.hasEntryCaseInsensitive("EncryptedPackage")) {
      throw isProtected();
    }
    for (String name : List.of("Workbook", "WORKBOOK", "BOOK", "Book")) {
      if (root.hasEntry(name)) {
        return name;
      }
    }
    throw FileKind.foreign(
        root.hasEntry("WordDocument")
            ? "a word processor's document (DOC)"
            : "a compound document without a workbook in it");
  }

  private static Unreadable isProtected() {
    return new Unreadable(
        "the file",
        "a workbook protected by a password",
        "a workbook that opens without a password",
        "open it in a spreadsheet program, take the password off, save it and drop it again");
  }

  private static void checkSize(Path file) {
    long size;
    try {
      size = Files.size(file);
    } catch (IOException e) {
      throw new DiskFailure(e);
    }
    if (size > Limits.XLS_BYTES) {
      throw new Unreadable(
          "the file",
          "an XLS workbook of " + size + " bytes",
          "at most " + Limits.XLS_BYTES + " bytes",
          "save the table as XLSX or CSV");
    }
  }
}
