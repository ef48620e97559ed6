package org.spikewright.decode;

import java.io.ByteArrayInputStream;
import java.io.ByteArrayOutputStream;
import java.io.IOException;
import java.io.UncheckedIOException;
import java.util.function.Consumer;
import org.apache.poi.hssf.record.Record;
import org.apache.poi.hssf.usermodel.HSSFSheet;
import org.apache.poi.hssf.usermodel.HSSFWorkbook;
import org.apache.poi.poifs.filesystem.POIFSFileSystem;

/** Writes XLS workbooks, whole or record by record. */
final class PoiXls {
  private PoiXls() {}

  static byte[] book(Consumer<HSSFWorkbook> content) {
    try (HSSFWorkbook book = new HSSFWorkbook();
        ByteArrayOutputStream bytes = new ByteArrayOutputStream()) {
      content.accept(book);
      book.write(bytes);
      return bytes.toByteArray();
    } catch (IOException e) {
      throw new UncheckedIOException(e);
    }
  }

  /** The sheet of a name, made when it is not there. */
  static HSSFSheet sheet(HSSFWorkbook book, String name) {
    HSSFSheet sheet = book.getSheet(name);
    return sheet == null ? book.createSheet(name) : sheet;
  }

  /** A compound document with one stream that holds nothing of use. */
  static byte[] compound(String stream) {
    return compound(stream, new byte[5000]);
  }

  /** A workbook of records. */
  static byte[] ofRecords(Record... records) {
    ByteArrayOutputStream stream = new ByteArrayOutputStream();
    for (Record record : records) {
      stream.writeBytes(record.serialize());
    }
    return compound("Workbook", stream.toByteArray());
  }

  private static byte[] compound(String stream, byte[] content) {
    try (POIFSFileSystem compound = new POIFSFileSystem();
        ByteArrayOutputStream bytes = new ByteArrayOutputStream()) {
      compound.createDocument(new ByteArrayInputStream(content), stream);
      compound.writeFilesystem(bytes);
      return bytes.toByteArray();
    } catch (IOException e) {
      throw new UncheckedIOException(e);
    }
  }
}
