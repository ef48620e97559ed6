package org.spikewright.mapping;

import java.util.Optional;
import org.spikewright.mapping.MappedFile.Unmappable;
import org.spikewright.reading.CheckReading;
import org.spikewright.table.Row;
import org.spikewright.table.RowSink;
import org.spikewright.table.Source;

/**
 * Maps one file. Each row below a header that is not blank becomes exactly one reading, one reading
 * beside the samples (drift check or calibration), one rejection or one declared skip. Sheets come
 * one after the other, each with its own header.
 *
 * <p>What went to the sink counts only if {@link #finish()} says {@link MappedFile.Mapped}.
 */
public final class RowMapper implements RowSink {
  private final Mapping mapping;
  private final MappedSink sink;
  private final FileState file;
  private Optional<Unmappable> fault;
  private Optional<Source> source = Optional.empty();
  private Optional<SheetMapper> sheet = Optional.empty();
  private HeaderSearch search;
  private long rows;
  private long readings;
  private long rejections;
  private long skipped;
  private long checks;
  private long calibrations;

  RowMapper(Mapping mapping, String relativePath, MappedSink sink) {
    this.mapping = mapping;
    this.sink = sink;
    this.file = new FileState(mapping, relativePath);
    this.fault = file.fault();
    this.search = new HeaderSearch(mapping);
  }

  /** Takes the next row; wants no more once the file cannot be mapped. */
  @Override
  public boolean accept(Row row) {
    if (fault.isEmpty() && !isOfThisTable(row)) {
      begin(row.source());
    }
    if (fault.isPresent()) {
      return false;
    }
    if (sheet.isEmpty()) {
      look(row);
      return fault.isEmpty();
    }
    if (!row.isBlank()) {
      map(sheet.get(), row);
    }
    return true;
  }

  /** The rows of a table mostly share one object, so that its names are not compared. */
  private boolean isOfThisTable(Row row) {
    return source.isPresent()
        && (source.get() == row.source() || source.get().equals(row.source()));
  }

  private void begin(Source next) {
    if (source.isPresent() && sheet.isEmpty()) {
      fault = Optional.of(search.notFound(source.get()));
    }
    source = Optional.of(next);
    sheet = Optional.empty();
    search = new HeaderSearch(mapping);
  }

  private void look(Row row) {
    HeaderSearch.Found found = search.next(row);
    if (found instanceof HeaderSearch.Found.At at) {
      sheet = Optional.of(new SheetMapper(mapping, at.header(), file));
    } else if (found instanceof HeaderSearch.Found.Wrong wrong) {
      fault = Optional.of(wrong.why());
    }
  }

  private void map(SheetMapper mapper, Row row) {
    rows++;
    SheetMapper.Fate fate = mapper.map(row);
    if (fate instanceof SheetMapper.Fate.Read read) {
      readings++;
      sink.reading(read.reading());
    } else if (fate instanceof SheetMapper.Fate.Refused refused) {
      rejections++;
      sink.rejection(refused.rejection());
    } else if (fate instanceof SheetMapper.Fate.OfBatch beside) {
      checks += beside.reading() instanceof CheckReading ? 1 : 0;
      calibrations += beside.reading() instanceof CheckReading ? 0 : 1;
      sink.batchReading(beside.reading());
    } else {
      skipped++;
    }
  }

  /** Says what came of the file, after its last row. */
  public MappedFile finish() {
    if (fault.isPresent()) {
      return fault.get();
    }
    if (sheet.isEmpty()) {
      return search.notFound(source.orElse(new Source("", Optional.empty())));
    }
    if (rows == 0) {
      return new Unmappable(
          "the file",
          "no rows below the header",
          "at least one row of data",
          "export again, or take the file away if it is empty");
    }
    return new MappedFile.Mapped(
        new Tally(rows, readings, rejections, skipped, checks, calibrations));
  }
}
