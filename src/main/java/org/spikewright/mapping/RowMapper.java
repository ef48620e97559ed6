package org.spikewright.mapping;

import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import org.spikewright.mapping.MappedFile.Unmappable;
import org.spikewright.reading.CheckReading;
import org.spikewright.table.Row;
import org.spikewright.table.RowSink;
import org.spikewright.table.Source;
import org.spikewright.table.TextForm;

/**
 * Maps one file. Each row below a header that is not blank becomes exactly one reading, one reading
 * beside the samples (drift check or calibration), one rejection or one declared skip; in a wide
 * layout each of its cells that should hold a reading does. Sheets come one after the other, each
 * with its own header.
 *
 * <p>What went to the sink counts only if {@link #finish()} says {@link MappedFile.Mapped}.
 */
public final class RowMapper implements RowSink {
  private static final int HEADERS_SHOWN = 5;

  private final Mapping mapping;
  private final MappedSink sink;
  private final FileState file;
  private final MarkSearch marks;
  private final List<String> workedOut = new ArrayList<>();
  private final List<String> headers = new ArrayList<>();
  private Optional<Unmappable> fault;
  private Optional<Source> source = Optional.empty();
  private Optional<SheetWalk> sheet = Optional.empty();
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
    this.marks = new MarkSearch(mapping, this::take);
  }

  @Override
  public void begins(TextForm form) {
    if (mapping.shape().separator().isEmpty()) {
      workedOut.add(
          "separator " + TextForm.named(form.separator()) + " (" + form.separatorSource() + ")");
    }
    workedOut.add("encoding " + form.encoding() + " (" + form.encodingSource() + ")");
  }

  /** Takes the next row; wants no more once the file cannot be mapped. */
  @Override
  public boolean accept(Row row) {
    if (fault.isEmpty() && !isOfThisTable(row)) {
      begin(row.source());
    }
    if (fault.isEmpty()) {
      fault = sheet.orElseThrow().take(row);
    }
    return fault.isEmpty();
  }

  /** The rows of a table mostly share one object, so that its names are not compared. */
  private boolean isOfThisTable(Row row) {
    return source.isPresent()
        && (source.get() == row.source() || source.get().equals(row.source()));
  }

  private void begin(Source next) {
    endSheet();
    source = Optional.of(next);
    sheet = Optional.of(new SheetWalk(mapping, file, marks, this::take, next));
  }

  private void endSheet() {
    sheet.ifPresent(
        walk -> {
          headers.addAll(walk.headersMet());
          fault = walk.finish();
        });
    sheet = Optional.empty();
  }

  private void take(SheetMapper.Fate fate) {
    rows++;
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
    if (fault.isEmpty()) {
      endSheet();
    }
    if (fault.isEmpty()) {
      fault = marks.undecided();
    }
    if (fault.isPresent()) {
      return fault.get();
    }
    if (source.isEmpty()) {
      return new HeaderSearch(mapping).notFound(new Source("", Optional.empty()));
    }
    if (rows == 0) {
      return new Unmappable(
          "the file",
          "no rows below the header",
          "at least one row of data",
          "export again, or take the file away if it is empty");
    }
    return new MappedFile.Mapped(
        new Tally(rows, readings, rejections, skipped, checks, calibrations),
        List.copyOf(inWords()));
  }

  private List<String> inWords() {
    List<String> words = new ArrayList<>(workedOut);
    marks.inWords().ifPresent(words::add);
    words.add(
        "header in "
            + String.join("; ", headers.subList(0, Math.min(headers.size(), HEADERS_SHOWN)))
            + (headers.size() > HEADERS_SHOWN ? " and further ones" : ""));
    return words;
  }
}
