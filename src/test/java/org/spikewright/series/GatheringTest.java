package org.spikewright.series;

import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.within;
import static org.spikewright.testkit.Bench.madeUp;
import static org.spikewright.testkit.Bench.madeUpSeries;
import static org.spikewright.testkit.Bench.mgPerL;
import static org.spikewright.testkit.Bench.ml;
import static org.spikewright.testkit.Bench.oneVessel;
import static org.spikewright.testkit.Bench.reading;
import static org.spikewright.testkit.Bench.recorded;
import static org.spikewright.testkit.Bench.series;

import java.util.ArrayList;
import java.util.Collections;
import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.Random;
import org.junit.jupiter.api.Test;
import org.spikewright.quantity.Measured;
import org.spikewright.quantity.Quantity;
import org.spikewright.quantity.Unit;
import org.spikewright.reading.Addition;
import org.spikewright.reading.Batch;
import org.spikewright.reading.Blanks;
import org.spikewright.reading.Design;
import org.spikewright.reading.FlaskFacts;
import org.spikewright.reading.MethodFacts;
import org.spikewright.reading.Preparation;
import org.spikewright.reading.Reading;
import org.spikewright.reading.Recorded;
import org.spikewright.reading.Signal;
import org.spikewright.testkit.Bench;

class GatheringTest {

  @Test
  void madeUpAdditionsAreReferredToTheAliquot() {
    AdditionSeries series = series(madeUpSeries(0.2, 0.3, 0.4));
    assertThat(series.axisUnit().symbol()).isEqualTo("mg/L");
    assertThat(series.flasks()).extracting(Flask::x).containsExactly(0.0, 1.0, 2.0);
    assertThat(series.flasks()).extracting(Flask::volumeFactor).containsExactly(1.0, 1.0, 1.0);
  }

  @Test
  void unequalFinalVolumesScaleTheSignal() {
    // Skoog & co., Fundamentals: one flask 95.0 mL + 1.00 mL of 100 mg/L filled to 100.0 mL against
    // the undiluted sample (case SB03; from memory in part): 1.04 mg/L.
    List<Recorded> readings =
        List.of(
            recorded(reading(facts(0, 100, 95, 95), "1", 0.262, 0)),
            recorded(reading(facts(1, 100, 95, 100), "1", 0.500, 1)));
    AdditionSeries series = series(readings);
    double low = series.flasks().get(0).y();
    double slope = (series.flasks().get(1).y() - low) / series.flasks().get(1).x();
    double expected = 0.262 * 100 / 100 / (0.500 - 0.262 * 95 / 100);
    assertThat(low / slope).isCloseTo(expected, within(1e-12));
    assertThat(expected).isCloseTo(1.04, within(0.005));
  }

  private static FlaskFacts facts(double added, double stock, double aliquot, double total) {
    FlaskFacts base = madeUp(added);
    return new FlaskFacts(
        base.role(),
        Design.MADE_UP,
        new Addition.OfStock(new Quantity(added, Unit.of("mL")), mgPerL(stock)),
        Optional.of(ml(aliquot)),
        Optional.of(ml(total)),
        Optional.empty(),
        base.preparation(),
        base.blanks(),
        base.method());
  }

  @Test
  void growingVolumeInOneVesselIsTakenOut() {
    AdditionSeries series =
        series(
            List.of(
                recorded(reading(oneVessel(0), "1", 2.0, 0)),
                recorded(reading(oneVessel(1), "1", 3.0, 1)),
                recorded(reading(oneVessel(2), "1", 4.0, 2))));
    assertThat(series.flasks()).extracting(Flask::volumeFactor).containsExactly(1.0, 1.05, 1.1);
    assertThat(series.flasks()).extracting(Flask::x).containsExactly(0.0, 1.0, 2.0);
  }

  @Test
  void differentAliquotsInOneVesselAreRefused() {
    FlaskFacts step = oneVessel(1);
    FlaskFacts other =
        new FlaskFacts(
            step.role(),
            step.design(),
            step.addition(),
            Optional.of(ml(9)),
            Optional.empty(),
            step.startVolume(),
            step.preparation(),
            step.blanks(),
            step.method());
    List<Gathered> gathered =
        Bench.gather(
            List.of(
                recorded(reading(oneVessel(0), "1", 2.0, 0)), recorded(reading(other, "1", 3, 1))));
    assertThat(gathered).singleElement().isInstanceOf(Ungrouped.class);
    assertThat(((Ungrouped) gathered.get(0)).found()).contains("aliquot").contains("9 mL");
  }

  @Test
  void anAdditionThatDoesNotFitIntoTheFlaskIsRefused() {
    List<Gathered> gathered =
        Bench.gather(
            List.of(
                recorded(reading(madeUp(0), "1", 2.0, 0)),
                recorded(reading(madeUp(45), "1", 3.0, 1))));
    assertThat(((Ungrouped) gathered.get(0)).found()).contains("45 mL");
  }

  @Test
  void replicatesOfAFlaskAreAveragedAndNeverCountAsFlasks() {
    List<Recorded> readings = new ArrayList<>();
    for (int i = 0; i < 4; i++) {
      readings.add(recorded(reading(madeUp(i), "1", 10 + i, 2L * i)));
      readings.add(recorded(reading(madeUp(i), "2", 12 + i, 2L * i + 1)));
    }
    AdditionSeries series = series(readings);
    assertThat(series.flasks()).hasSize(4).extracting(Flask::meanSignal).contains(11.0, 14.0);
    assertThat(series.flasks().get(0).replicateSd()).isCloseTo(Math.sqrt(2), within(1e-15));
    assertThat(series.readings()).isEqualTo(8);
  }

  @Test
  void aPauseOverTheLimitBeginsAnotherSeries() {
    List<Recorded> readings = new ArrayList<>(madeUpSeries(1, 2, 3));
    for (int i = 0; i < 3; i++) {
      readings.add(recorded(reading(madeUp(i), "1", i + 5, 2 + 241 + i)));
    }
    assertThat(Bench.gather(readings)).hasSize(2).extracting(g -> g.key().ordinal()).contains(1, 2);
  }

  @Test
  void aSecondRunWithinTheSeriesIsKeptBesideTheFirst() {
    List<Recorded> readings = new ArrayList<>(madeUpSeries(1, 2, 3));
    readings.add(recorded(reading(madeUp(2), "1", 9, 60)));
    AdditionSeries series = series(readings);
    assertThat(series.flasks().get(2).meanSignal()).isEqualTo(3);
    assertThat(series.flasks().get(2).secondRun()).hasSize(1);
    assertThat(series.notes()).extracting(SeriesNote::kind).contains(SeriesNote.Kind.SECOND_RUN);
  }

  @Test
  void withoutMappedReplicatesLaterReadingsOfAFlaskAreReplicates() {
    List<Recorded> readings =
        List.of(
            recorded(reading(madeUp(0), "", 1, 0)),
            recorded(reading(madeUp(0), "", 3, 1)),
            recorded(reading(madeUp(1), "", 5, 2)));
    assertThat(series(readings).flasks().get(0).meanSignal()).isEqualTo(2);
  }

  @Test
  void aCorrectedAdditionFromALaterDeliveryReplacesTheReading() {
    List<Recorded> readings = new ArrayList<>(madeUpSeries(1, 2, 3));
    Reading third = readings.get(2).reading();
    Reading corrected = reading(madeUp(4), "1", 3, 2);
    readings.add(new Recorded(corrected, 2, Bench.ARRIVAL.plusSeconds(60), 0));
    AdditionSeries series = series(readings);
    assertThat(third.measuredAt()).isEqualTo(corrected.measuredAt());
    assertThat(series.flasks()).extracting(Flask::x).containsExactly(0.0, 1.0, 4.0);
    assertThat(series.notes())
        .extracting(SeriesNote::kind)
        .containsExactly(SeriesNote.Kind.SUPERSEDED_READING);
  }

  @Test
  void flasksOfDifferentPreparationsAreSeparateSeries() {
    List<Recorded> readings = new ArrayList<>(madeUpSeries(1, 2, 3));
    for (int i = 0; i < 3; i++) {
      readings.add(recorded(reading(diluted(madeUp(i), 10), "1", i, 10 + i)));
    }
    assertThat(Bench.gather(readings))
        .hasSize(2)
        .extracting(g -> g.key().preparation())
        .containsExactly("", "diluted 10-fold");
  }

  private static FlaskFacts diluted(FlaskFacts facts, double factor) {
    return prepared(
        facts,
        new Preparation(
            Optional.empty(), factor, Optional.empty(), Optional.empty(), OptionalDouble.empty()),
        facts.method());
  }

  private static FlaskFacts prepared(FlaskFacts facts, Preparation how, MethodFacts method) {
    return new FlaskFacts(
        facts.role(),
        facts.design(),
        facts.addition(),
        facts.aliquot(),
        facts.finalVolume(),
        facts.startVolume(),
        how,
        facts.blanks(),
        method);
  }

  @Test
  void solidsAreReferredToTheDryTestPortionAndTheUnitSaysSo() {
    Preparation digest =
        new Preparation(
            Optional.empty(),
            5,
            Optional.of(new Quantity(0.5, Unit.of("g"))),
            Optional.of(new Quantity(50, Unit.of("mL"))),
            OptionalDouble.of(0.8));
    List<Recorded> readings = new ArrayList<>();
    for (int i = 0; i < 3; i++) {
      FlaskFacts facts = prepared(madeUp(i), digest, MethodFacts.of(Unit.of("mg/kg")));
      readings.add(recorded(reading(facts, "1", i + 1, i)));
    }
    ToResult scale = series(readings).toResult();
    // 1 mg/L · 5 · 50 mL / 0.5 g / 0.8 = 625 mg/kg
    assertThat(scale.value(1)).isCloseTo(625, within(1e-10));
    assertThat(scale.unit().symbol()).isEqualTo("mg/kg dry");
  }

  @Test
  void aResultUnitThatTheFactsDoNotLeadToIsRefused() {
    FlaskFacts facts = prepared(madeUp(1), Preparation.NONE, MethodFacts.of(Unit.of("mg/kg")));
    List<Gathered> gathered = Bench.gather(List.of(recorded(reading(facts, "1", 1, 0))));
    assertThat(((Ungrouped) gathered.get(0)).expected()).contains("mg/kg");
  }

  @Test
  void stocksOfDifferentKindsAreRefusedInWords() {
    FlaskFacts mass = madeUp(1);
    FlaskFacts amount =
        new FlaskFacts(
            mass.role(),
            mass.design(),
            new Addition.OfStock(
                new Quantity(2, Unit.of("mL")),
                Measured.exactly(new Quantity(1, Unit.of("mmol/L")))),
            mass.aliquot(),
            mass.finalVolume(),
            mass.startVolume(),
            mass.preparation(),
            mass.blanks(),
            mass.method());
    List<Gathered> gathered =
        Bench.gather(
            List.of(recorded(reading(mass, "1", 1, 0)), recorded(reading(amount, "1", 2, 1))));
    assertThat(((Ungrouped) gathered.get(0)).found())
        .isEqualTo(
            "more than one kind of concentration: a mass concentration, an amount concentration");
  }

  @Test
  void theThreeBlanksGoWhereTheyBelong() {
    Blanks blanks =
        new Blanks(OptionalDouble.of(0.1), Optional.of(mgPerL(0.25)), Optional.of(mgPerL(0.5)));
    List<Recorded> readings = new ArrayList<>();
    for (int i = 0; i < 3; i++) {
      FlaskFacts f = madeUp(i);
      FlaskFacts facts =
          new FlaskFacts(
              f.role(),
              f.design(),
              f.addition(),
              f.aliquot(),
              f.finalVolume(),
              f.startVolume(),
              f.preparation(),
              blanks,
              f.method());
      readings.add(recorded(reading(facts, "1", i + 1, i)));
    }
    AdditionSeries series = series(readings);
    assertThat(series.flasks().get(0).meanSignal()).isEqualTo(0.9);
    assertThat(series.flasks().get(1).x()).isCloseTo(1.05, within(1e-15));
    assertThat(series.toResult().value(1)).isEqualTo(0.75);
  }

  @Test
  void wordsForNoNumberLeaveTheReadingOutAndSaySo() {
    List<Recorded> readings = new ArrayList<>(madeUpSeries(1, 2, 3));
    Reading top = reading(madeUp(3), "1", 4, 3);
    readings.add(
        recorded(
            new Reading(
                top.subject(),
                top.batch(),
                top.flask(),
                false,
                "1",
                true,
                top.measuredAt(),
                new Signal.NoNumber(Signal.State.OVER_RANGE, "OVER"),
                top.facts(),
                top.position())));
    AdditionSeries series = series(readings);
    assertThat(series.flasks()).hasSize(4);
    assertThat(series.usableFlasks()).hasSize(3);
    assertThat(series.notes()).extracting(SeriesNote::kind).contains(SeriesNote.Kind.OVER_RANGE);
  }

  @Test
  void untimedBatchesThatAgreeDigitForDigitAreOneSeries() {
    List<Recorded> readings = new ArrayList<>(untimed("b.csv", 1, 1, 2, 3));
    readings.addAll(untimed("a.csv", 2, 1, 2, 3, 4));
    AdditionSeries series = series(readings);
    assertThat(series.batchName()).isEqualTo("a.csv");
    assertThat(series.flasks()).hasSize(4);
    assertThat(series.readings()).isEqualTo(4);
    assertThat(series.notes())
        .containsExactly(new SeriesNote(SeriesNote.Kind.EXPORTED_AGAIN, "b.csv"));
  }

  @Test
  void untimedBatchesThatDifferInOneDigitStayApart() {
    List<Recorded> readings = new ArrayList<>(untimed("b.csv", 1, 1, 2, 3));
    readings.addAll(untimed("a.csv", 2, 1, 2, 3.1));
    assertThat(Bench.gather(readings)).hasSize(2);
  }

  private static List<Recorded> untimed(String batch, long arrival, double... signals) {
    List<Recorded> readings = new ArrayList<>();
    for (int i = 0; i < signals.length; i++) {
      Reading timed = reading(madeUp(i), "1", signals[i], i);
      Reading untimed =
          new Reading(
              timed.subject(),
              new Batch(batch, true),
              timed.flask(),
              false,
              "1",
              true,
              Optional.empty(),
              timed.signal(),
              timed.facts(),
              timed.position());
      readings.add(new Recorded(untimed, arrival, Bench.ARRIVAL, 0));
    }
    return readings;
  }

  @Test
  void theOrderOfReadingsChangesNothing() {
    List<Recorded> readings = new ArrayList<>(madeUpSeries(1, 2, 3.5, 4.1, 5.2));
    readings.add(recorded(reading(madeUp(1), "2", 2.1, 30)));
    readings.add(recorded(reading(madeUp(2), "1", 3.6, 300)));
    readings.addAll(untimed("a.csv", 1, 1, 2, 3));
    List<Gathered> expected = Bench.gather(readings);
    for (long seed = 1; seed <= 50; seed++) {
      Collections.shuffle(readings, new Random(seed));
      assertThat(Bench.gather(readings)).as("seed %d", seed).isEqualTo(expected);
    }
  }

  @Test
  void aToleranceOfTheMethodBlankBecomesAStandardUncertainty() {
    Measured blank =
        new Measured(new Quantity(0.25, Unit.of("mg/L")), OptionalDouble.of(0.03 * Math.sqrt(3)));
    FlaskFacts f = madeUp(0);
    FlaskFacts facts =
        new FlaskFacts(
            f.role(),
            f.design(),
            f.addition(),
            f.aliquot(),
            f.finalVolume(),
            f.startVolume(),
            f.preparation(),
            new Blanks(OptionalDouble.empty(), Optional.of(blank), Optional.empty()),
            f.method());
    AdditionSeries series = series(List.of(recorded(reading(facts, "1", 1, 0))));
    assertThat(series.toResult().methodBlankUncertainty()).isCloseTo(0.03, within(1e-15));
  }
}
