package org.spikewright.decode;

import java.io.IOException;
import java.nio.file.Path;
import java.util.Optional;
import javax.xml.stream.XMLStreamException;
import org.slf4j.Logger;
import org.slf4j.LoggerFactory;
import org.spikewright.table.DecodeFault;
import org.spikewright.table.RowSink;
import org.spikewright.table.TableShape;

/**
 * Reads one file of any kind into rows. The kind is told by content: a wrong extension does not
 * matter.
 */
public final class FileDecoder {
  private static final Logger LOG = LoggerFactory.getLogger(FileDecoder.class);
  private static final int DETAIL_CHARS = 160;

  private FileDecoder() {}

  /**
   * Reads a file and hands its rows on in file order, as they are met; rows in which nothing stands
   * are passed over unless the shape wants them, and row numbers still count them. A fault may come
   * after rows were handed on: they then count for nothing. Memory is bounded whatever the size of
   * the file.
   *
   * <p>This is the one place that catches what a file's content can provoke. What the sink throws
   * comes out as it is; so do errors of the virtual machine such as {@link OutOfMemoryError}.
   *
   * @param file opened for reading only; links, pipes and devices are the caller's concern
   * @param shownName the file's name as rows and messages show it
   * @param shape how text is cut into cells, and which sheets are wanted
   * @param sink takes the rows; when it wants no more, reading stops without a fault
   * @return why the file could not be read as a whole; empty when it was
   * @throws java.io.UncheckedIOException when the file cannot be opened, or the disk or share fails
   *     while it is read: that says nothing about the content, and the file may be tried again
   */
  public static Optional<DecodeFault> read(
      Path file, String shownName, TableShape shape, RowSink sink) {
    Delivery delivery = new Delivery(sink, shape.emptyRows());
    try {
      decode(file, shownName, shape, delivery);
      return Optional.empty();
    } catch (Delivery.SinkThrew e) {
      throw e.unwrapped();
    } catch (Unreadable e) {
      return Optional.of(e.fault());
    } catch (DiskFailure e) {
      throw e;
    } catch (IOException | XMLStreamException | RuntimeException | StackOverflowError e) {
      DiskFailure.assertBytesReadable(file);
      LOG.debug("{} cannot be read", shownName, e);
      return Optional.of(damaged(delivery.place(), e));
    }
  }

  private static void decode(Path file, String shownName, TableShape shape, RowSink sink)
      throws IOException, XMLStreamException {
    switch (FileKind.of(file)) {
      case EMPTY ->
          throw new Unreadable(
              "the file",
              "nothing: it is empty (0 bytes)",
              "a table",
              "export the table again and drop it again");
      case ZIP -> XlsxDecoder.read(file, shownName, shape.sheets(), sink);
      case COMPOUND -> XlsDecoder.read(file, shownName, shape.sheets(), sink);
      case TEXT -> CsvDecoder.read(file, shownName, shape, sink);
    }
  }

  private static DecodeFault damaged(String place, Throwable cause) {
    String detail = cause.getMessage() == null ? "" : " " + cause.getMessage();
    return new DecodeFault(
        place,
        "damaged content that cannot be followed ("
            + Shown.plain(cause.getClass().getSimpleName() + detail, DETAIL_CHARS)
            + ")",
        "a whole file, as the instrument or a spreadsheet program writes it",
        "copy the file again from where it was made, or open it in a spreadsheet program and save"
            + " it anew, and drop it again");
  }
}
