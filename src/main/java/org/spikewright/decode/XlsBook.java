package org.spikewright.decode;

import java.util.ArrayList;
import java.util.HashSet;
import java.util.List;
import java.util.Optional;
import java.util.Set;
import org.apache.poi.hssf.record.BOFRecord;
import org.apache.poi.hssf.record.BoundSheetRecord;
import org.apache.poi.hssf.record.DateWindow1904Record;
import org.apache.poi.hssf.record.EOFRecord;
import org.apache.poi.hssf.record.ExtendedFormatRecord;
import org.apache.poi.hssf.record.FormatRecord;
import org.apache.poi.hssf.record.Record;
import org.apache.poi.hssf.record.SSTRecord;
import org.spikewright.table.RowSink;
import org.spikewright.table.SheetRule;

/**
 * Follows the records of an XLS workbook: first those of the whole book, then sheet after sheet.
 * Charts lie within sheets and hold copies of values, which are no cells: what is nested is passed
 * over.
 */
final class XlsBook {
  private final String shownName;
  private final List<SheetRule> wanted;
  private final RowSink sink;
  private final List<BoundSheetRecord> sheets = new ArrayList<>();
  private final XlsCells.Book book = new XlsCells.Book();
  private int depth;
  private int substreams;

  /** Names of the sheets to read that were not met yet. */
  private Set<String> ahead = new HashSet<>();

  private List<BoundSheetRecord> inFileOrder = List.of();
  private Optional<XlsCells> current = Optional.empty();

  XlsBook(String shownName, List<SheetRule> wanted, RowSink sink) {
    this.shownName = shownName;
    this.wanted = wanted;
    this.sink = sink;
  }

  /** Follows one record; false when no more are needed. */
  boolean follow(Record record) {
    if (record instanceof BOFRecord begin) {
      depth++;
      if (depth == 1) {
        begin(begin);
      }
      return true;
    }
    if (record instanceof EOFRecord) {
      depth--;
      return depth > 0 || end();
    }
    if (depth != 1) {
      return true;
    }
    if (current.isPresent()) {
      return current.get().follow(record);
    }
    if (substreams == 1) {
      ofBook(record);
    }
    return true;
  }

  /** Throws when the file ended before every wanted sheet did. */
  void checkWhole() {
    if (depth > 0 || substreams == 0 || !ahead.isEmpty()) {
      throw new Unreadable(
          "the file",
          "a workbook that breaks off before its last sheet ends",
          "a whole XLS file",
          "if it was still being copied, drop it again; else copy it again from where it was made");
    }
  }

  private void begin(BOFRecord begin) {
    substreams++;
    if (substreams == 1) {
      if (begin.getVersion() != BOFRecord.VERSION) {
        throw FileKind.foreign("an XLS workbook of an edition before 1997");
      }
      return;
    }
    int index = substreams - 2;
    if (index >= inFileOrder.size()) {
      return;
    }
    String name = inFileOrder.get(index).getSheetname();
    if (ahead.remove(name)) {
      if (begin.getType() != BOFRecord.TYPE_WORKSHEET) {
        throw new Unreadable(
            "sheet " + name, "a chart or macro sheet", "a sheet of cells", "name another sheet");
      }
      current = Optional.of(new XlsCells(book, new RowAssembly(shownName, name, sink)));
    }
  }

  private boolean end() {
    if (substreams == 1) {
      choose();
      return true;
    }
    boolean more = current.isEmpty() || current.get().end();
    current = Optional.empty();
    return more && !ahead.isEmpty();
  }

  private void choose() {
    List<SheetChoice> choices =
        sheets.stream()
            .map(s -> new SheetChoice(s.getSheetname(), s.isHidden() || s.isVeryHidden()))
            .toList();
    ahead = new HashSet<>();
    for (int index : SheetChoice.among(choices, wanted)) {
      ahead.add(sheets.get(index).getSheetname());
    }
    inFileOrder = List.of(BoundSheetRecord.orderByBofPosition(sheets));
  }

  private void ofBook(Record record) {
    if (record instanceof BoundSheetRecord sheet) {
      sheets.add(sheet);
    } else if (record instanceof DateWindow1904Record window) {
      book.dates1904(window.getWindowing() == 1);
    } else if (record instanceof FormatRecord format) {
      book.format(format.getIndexCode(), format.getFormatString());
    } else if (record instanceof ExtendedFormatRecord style) {
      book.style(style.getFormatIndex());
    } else if (record instanceof SSTRecord strings) {
      book.strings(strings);
    }
  }
}
