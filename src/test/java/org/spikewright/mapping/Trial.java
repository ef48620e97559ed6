package org.spikewright.mapping;

import static org.assertj.core.api.Assertions.assertThat;

import java.nio.file.Path;
import java.time.ZoneId;
import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import org.spikewright.config.Loaded;
import org.spikewright.config.MappingFile;
import org.spikewright.reading.BatchReading;
import org.spikewright.reading.Reading;
import org.spikewright.table.Cell;
import org.spikewright.table.Row;
import org.spikewright.table.Source;

/** Maps rows that stand in a test. */
public final class Trial implements MappedSink {
  /** What came out. */
  public final List<Reading> readings = new ArrayList<>();

  public final List<BatchReading> besideSamples = new ArrayList<>();
  public final List<Rejection> rejections = new ArrayList<>();
  public MappedFile file;

  private Trial() {}

  @Override
  public void reading(Reading reading) {
    readings.add(reading);
  }

  @Override
  public void batchReading(BatchReading reading) {
    besideSamples.add(reading);
  }

  @Override
  public void rejection(Rejection rejection) {
    rejections.add(rejection);
  }

  /** A mapping that must be in order. */
  public static Mapping mapping(String toml) {
    Loaded<Mapping> loaded =
        MappingFile.read(Path.of("trial.toml"), toml, ZoneId.of("Europe/Berlin"));
    assertThat(loaded).as("the mapping").isInstanceOf(Loaded.Good.class);
    return ((Loaded.Good<Mapping>) loaded).value();
  }

  /** Maps a text table; cells are parted by the separator, blank cells are blank. */
  public static Trial text(Mapping mapping, String path, String separator, String... lines) {
    Source source = new Source(path, Optional.empty());
    List<Row> rows = new ArrayList<>();
    for (int i = 0; i < lines.length; i++) {
      List<Cell> cells = new ArrayList<>();
      for (String cell : lines[i].split(java.util.regex.Pattern.quote(separator), -1)) {
        cells.add(cell.isBlank() ? Cell.BLANK : new Cell.Text(cell));
      }
      rows.add(new Row(source, i + 1, cells));
    }
    return rows(mapping, path, rows);
  }

  /** Maps rows. */
  public static Trial rows(Mapping mapping, String path, List<Row> rows) {
    Trial trial = new Trial();
    RowMapper mapper = mapping.open(path, trial);
    for (Row row : rows) {
      if (!mapper.accept(row)) {
        break;
      }
    }
    trial.file = mapper.finish();
    return trial;
  }

  /** The tally of a file that was mapped. */
  public Tally tally() {
    assertThat(file).isInstanceOf(MappedFile.Mapped.class);
    return ((MappedFile.Mapped) file).tally();
  }

  /** Why the file was not mapped. */
  public MappedFile.Unmappable unmappable() {
    assertThat(file).isInstanceOf(MappedFile.Unmappable.class);
    return (MappedFile.Unmappable) file;
  }
}
