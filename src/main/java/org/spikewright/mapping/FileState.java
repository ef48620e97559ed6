package org.spikewright.mapping;

import java.util.EnumMap;
import java.util.HashMap;
import java.util.Map;
import java.util.Optional;
import java.util.regex.Matcher;
import org.spikewright.reading.Batch;
import org.spikewright.reading.Subject;

/** What goes on from row to row of one file, over all its sheets. */
final class FileState {
  /** Whose readings are counted where neither replicate nor time tells them apart. */
  record Counted(Subject subject, String batch, String preparation, String flask) {}

  private final Mapping mapping;
  private final String path;
  private final Map<Fact, String> fromFileName = new EnumMap<>(Fact.class);
  private final Map<TimeForm, TimeReader> times = new HashMap<>();
  private final Map<Counted, Integer> counts = new HashMap<>();
  private final Steps steps = new Steps();
  private final Optional<MappedFile.Unmappable> fault;
  private final Batch batch;
  private final boolean timed;

  FileState(Mapping mapping, String path) {
    this.mapping = mapping;
    this.path = path;
    this.timed = mapping.places().isRead(Fact.MEASURED_AT);
    this.fault = readFileName();
    String name = fromFileName.getOrDefault(Fact.BATCH, "");
    this.batch = new Batch(name.isBlank() ? batchName() : name, !timed);
  }

  private Optional<MappedFile.Unmappable> readFileName() {
    for (Places.Named rule : mapping.places().fileName()) {
      Matcher matcher = rule.pattern().matcher(path);
      if (!matcher.matches()) {
        return Optional.of(
            new MappedFile.Unmappable(
                "the file's name",
                Said.quoted(path),
                "a name that matches " + rule.pattern().pattern(),
                "rename the file, or correct pattern under [file] in mapping '"
                    + mapping.name()
                    + "'"));
      }
      rule.groups().forEach((fact, group) -> keep(fact, matcher.group(group.name())));
    }
    return Optional.empty();
  }

  private void keep(Fact fact, String text) {
    if (text != null && !text.isBlank()) {
      fromFileName.put(fact, text);
    }
  }

  private String batchName() {
    return mapping
        .places()
        .fixedNames()
        .getOrDefault(Fact.BATCH, path.substring(path.lastIndexOf('/') + 1));
  }

  /** Why the file's name refuses the file. */
  Optional<MappedFile.Unmappable> fault() {
    return fault;
  }

  /** The facts that the file's name gives. */
  Map<Fact, String> fromFileName() {
    return fromFileName;
  }

  /** The batch of rows that name none. */
  Batch batch() {
    return batch;
  }

  /** Whether rows bear a time of measurement. */
  boolean isTimed() {
    return timed;
  }

  /** The reader of times in a form; one for the whole file, since row order counts. */
  TimeReader times(TimeForm form) {
    return times.computeIfAbsent(form, TimeReader::new);
  }

  /** The totals of vessels. */
  Steps steps() {
    return steps;
  }

  /** How many readings of a flask came, with this one. */
  int count(Counted counted) {
    return counts.merge(counted, 1, Integer::sum);
  }
}
