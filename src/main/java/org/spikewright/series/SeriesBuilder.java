package org.spikewright.series;

import java.time.Instant;
import java.util.ArrayList;
import java.util.Comparator;
import java.util.List;
import java.util.stream.Collectors;
import java.util.stream.Stream;
import org.spikewright.reading.FlaskFacts;
import org.spikewright.reading.Recorded;
import org.spikewright.reading.Signal;
import org.spikewright.reading.Signal.State;

/** Builds a series from flasks whose facts fit together. */
final class SeriesBuilder {
  private static final Comparator<Flask> BY_ADDITION =
      Comparator.comparingDouble(Flask::x).thenComparing(Flask::label);

  private final SeriesKey key;
  private final Cluster cluster;
  private final List<FlaskDraft> drafts;
  private final FlaskFacts facts;

  SeriesBuilder(SeriesKey key, Cluster cluster, List<FlaskDraft> drafts) {
    this.key = key;
    this.cluster = cluster;
    this.facts = drafts.get(0).facts();
    this.drafts =
        facts.method().fitReadings()
            ? drafts.stream().flatMap(SeriesBuilder::readingByReading).toList()
            : drafts;
  }

  AdditionSeries build() {
    List<FlaskFacts> each = new ArrayList<>(drafts.size());
    for (FlaskDraft draft : drafts) {
      each.add(draft.facts());
    }
    Axis axis = Axis.of(each);
    List<Flask> flasks = new ArrayList<>(drafts.size());
    for (int i = 0; i < drafts.size(); i++) {
      flasks.add(Flask.of(drafts.get(i), axis.x()[i], axis.factor()[i]));
    }
    flasks.sort(BY_ADDITION);
    return new AdditionSeries(
        key,
        cluster.batchName(),
        facts.role(),
        facts.design(),
        facts.preparation(),
        facts.method(),
        axis.unit(),
        axis.measured() / axis.unit().perBase(),
        ToResult.of(facts, axis),
        List.copyOf(flasks),
        notes(),
        lastReadingAt(),
        drafts.get(0).readings().get(0).reading().measuredAt().isPresent());
  }

  /**
   * Each reading as a flask of its own, where the laboratory asks for that; a second run stays with
   * the first of them.
   */
  private static Stream<FlaskDraft> readingByReading(FlaskDraft draft) {
    return draft.readings().stream()
        .map(
            recorded ->
                new FlaskDraft(
                    draft.label() + ", reading " + (draft.readings().indexOf(recorded) + 1),
                    draft.facts(),
                    List.of(recorded),
                    recorded.equals(draft.readings().get(0)) ? draft.secondRun() : List.of()));
  }

  private Instant lastReadingAt() {
    Instant last = Instant.MIN;
    for (FlaskDraft draft : drafts) {
      for (Recorded recorded : draft.readings()) {
        Instant time = recorded.reading().measuredAt().orElse(recorded.firstArrivedAt());
        last = time.isAfter(last) ? time : last;
      }
    }
    return last;
  }

  /** Whether there is nothing to remark, as with nearly every series; so it is asked first. */
  private boolean isPlain() {
    for (FlaskDraft draft : drafts) {
      if (!draft.secondRun().isEmpty()
          || !draft.facts().aliquot().equals(facts.aliquot())
          || isOfExpiredStock(draft.facts())) {
        return false;
      }
      for (Recorded recorded : draft.readings()) {
        if (recorded.superseded() > 0 || !(recorded.reading().signal() instanceof Signal.Value)) {
          return false;
        }
      }
    }
    return cluster.alsoNamed().isEmpty();
  }

  private List<SeriesNote> notes() {
    if (isPlain()) {
      return List.of();
    }
    List<SeriesNote> notes = new ArrayList<>();
    note(notes, SeriesNote.Kind.OVER_RANGE, states(State.OVER_RANGE));
    note(
        notes,
        SeriesNote.Kind.LEFT_OUT,
        Stream.concat(states(State.BELOW_RANGE), states(State.MISSING)));
    note(
        notes,
        SeriesNote.Kind.SUPERSEDED_READING,
        drafts.stream()
            .flatMap(draft -> draft.readings().stream())
            .filter(r -> r.superseded() > 0)
            .map(r -> r.reading().position().toString()));
    note(
        notes,
        SeriesNote.Kind.SECOND_RUN,
        drafts.stream().filter(d -> !d.secondRun().isEmpty()).map(FlaskDraft::label));
    note(notes, SeriesNote.Kind.EXPORTED_AGAIN, cluster.alsoNamed().stream());
    List<String> aliquots =
        drafts.stream()
            .flatMap(d -> d.facts().aliquot().stream())
            .map(Object::toString)
            .distinct()
            .toList();
    if (aliquots.size() > 1) {
      note(notes, SeriesNote.Kind.UNEQUAL_ALIQUOTS, aliquots.stream());
    }
    note(
        notes,
        SeriesNote.Kind.EXPIRED_STOCK,
        drafts.stream()
            .map(FlaskDraft::facts)
            .filter(this::isOfExpiredStock)
            .map(spiked -> spiked.bottle().orElseThrow())
            .map(bottle -> bottle.name() + ", last day " + bottle.expires().orElseThrow())
            .distinct());
    return List.copyOf(notes);
  }

  /** By the lab day of the series, which is that of its first reading. */
  private boolean isOfExpiredStock(FlaskFacts spiked) {
    return spiked.bottle().isPresent()
        && !spiked.addition().isNone()
        && spiked.bottle().get().isExpiredOn(cluster.labDay());
  }

  private Stream<String> states(State state) {
    return drafts.stream()
        .flatMap(
            draft ->
                draft.readings().stream()
                    .filter(r -> isIn(r.reading().signal(), state))
                    .map(r -> "flask " + draft.label() + " (" + r.reading().position() + ")"));
  }

  private static boolean isIn(Signal signal, State state) {
    return signal instanceof Signal.NoNumber word && word.state() == state;
  }

  private static void note(List<SeriesNote> notes, SeriesNote.Kind kind, Stream<String> places) {
    String words = places.collect(Collectors.joining(", "));
    if (!words.isEmpty()) {
      notes.add(new SeriesNote(kind, words));
    }
  }
}
