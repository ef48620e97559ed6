package org.spikewright.config;

import java.util.List;
import java.util.Optional;
import org.spikewright.mapping.Chain;
import org.spikewright.mapping.Fact;
import org.spikewright.mapping.MethodRule;
import org.spikewright.mapping.PerAnalyte;
import org.spikewright.mapping.Places;
import org.spikewright.quantity.Dimension;
import org.spikewright.quantity.Measured;
import org.spikewright.quantity.Unit;
import org.spikewright.reading.Design;

/** Whether the parts of a mapping, each in order by itself, make sense together. */
final class MappingCheck {
  private static final List<Fact> ALWAYS = List.of(Fact.SAMPLE, Fact.ANALYTE, Fact.SIGNAL);

  private final Section root;
  private final Faults faults;
  private final Named named;
  private final MethodRule method;
  private final Places places;
  private final Requirements needs;

  MappingCheck(Section root, Named named, MethodRule method, Places places) {
    this.root = root;
    this.faults = root.faults();
    this.named = named;
    this.method = method;
    this.places = places;
    this.needs = new Requirements(root, named);
  }

  void check() {
    ALWAYS.forEach(fact -> needs.require(fact, "every reading needs it"));
    if (needs.fixedHas("design")) {
      new DesignCheck(needs, method, places).check();
    }
    means();
    digest();
    if (!named.has(Fact.METHOD_BLANK)) {
      needs.refuse(Fact.METHOD_BLANK_DILUTION, "without method_blank", "method_blank beside it");
    }
    units();
  }

  private void means() {
    needs.together(Fact.SIGNAL_SD, Fact.READINGS);
    needs.together(Fact.READINGS, Fact.SIGNAL_SD);
    if (method.fitReadings()) {
      needs.refuse(
          Fact.SIGNAL_SD,
          "beside unit = \"reading\" in [method]",
          "unit = \"flask\": of readings whose mean alone is known none can be a point");
    }
    if (named.has(Fact.INTERNAL_STANDARD)) {
      needs.refuse(
          Fact.SIGNAL_SD,
          "beside internal_standard",
          "mean and standard deviation of the ratio as signal and signal_sd, or single readings: how"
              + " the ratio scatters does not follow from how the signal does");
    }
    PerAnalyte<Measured> fixed =
        places.fixedAmounts().getOrDefault(Fact.READINGS, PerAnalyte.none());
    boolean odd =
        fixed.values().anyMatch(n -> n.quantity().value() != Math.rint(n.quantity().value()));
    if (odd || !fixed.each().isEmpty()) {
      faults.add(
          root.at("fixed", Fact.READINGS.word()),
          "readings in [fixed] that are no whole number, or not one for all",
          "one whole number, such as readings = 3");
    }
  }

  private void digest() {
    if (named.has(Fact.DIGEST_VOLUME) && named.has(Fact.DIGEST_MASS)) {
      needs.refuse(Fact.DIGEST_MASS, "beside digest_volume", "one of the two");
    }
    if (!named.has(Fact.DIGEST_MASS)) {
      needs.together(Fact.TEST_PORTION, Fact.DIGEST_VOLUME);
    }
    needs.together(Fact.DIGEST_VOLUME, Fact.TEST_PORTION);
    needs.together(Fact.DIGEST_MASS, Fact.TEST_PORTION);
    if (!named.has(Fact.TEST_PORTION)) {
      needs.refuse(
          Fact.DRY_MASS, "without test_portion", "test_portion and digest_volume beside it");
    }
  }

  private void units() {
    Fact added = method.design() == Design.STATED ? Fact.ADDITION : Fact.STOCK;
    for (Named.Known known : named.units(added)) {
      if (added == Fact.STOCK && !method.fitsStock(known.unit().dimension())) {
        faults.add(known.at(), "stock in " + known.unit(), method.stockExpectation());
        continue;
      }
      result(added, known);
      like(Fact.METHOD_BLANK, added, known);
      like(Fact.SOLVENT_BLANK, added, known);
    }
    readBack(added);
    reportingLimit();
    workingRange();
  }

  private Chain chain() {
    return new Chain(
        named.units(Fact.TEST_PORTION).stream()
            .findFirst()
            .map(portion -> portion.unit().dimension()),
        named.has(Fact.DIGEST_MASS),
        named.has(Fact.MOLAR_MASS));
  }

  /** A concentration that was read back is of the kind of the additions. */
  private void readBack(Fact added) {
    Optional<Unit> read = method.signal().unit();
    for (Named.Known known : named.units(added)) {
      if (read.isPresent()
          && method.design() != Design.ELECTRODE
          && read.get().dimension() != Dimension.POTENTIAL
          && !chain().addUp(read.get().dimension(), known.unit().dimension())) {
        faults.add(
            root.at("fixed", "signal_unit"),
            "signal_unit " + read.get() + " beside " + added.word() + " in " + known.unit(),
            known.unit().dimension().words());
      }
    }
  }

  private void result(Fact added, Named.Known known) {
    List<Named.Known> portions = named.units(Fact.TEST_PORTION);
    // A portion whose unit only the rows tell is checked row by row.
    if (named.has(Fact.TEST_PORTION) && portions.isEmpty()) {
      return;
    }
    List<Unit> results =
        known.analyte().isPresent()
            ? method.resultUnit().of(known.analyte().get()).stream().toList()
            : method.resultUnit().values().toList();
    for (Unit result : results) {
      Optional<String> fault = chain().fault(known.unit().dimension(), result.dimension());
      if (fault.isPresent()) {
        faults.add(
            known.at(),
            added.word() + " in " + known.unit() + " beside a result in " + result,
            "a result that is " + fault.get());
      }
    }
  }

  private void like(Fact fact, Fact added, Named.Known known) {
    for (Named.Known blank : named.units(fact)) {
      boolean sameAnalyte =
          blank.analyte().isEmpty()
              || known.analyte().isEmpty()
              || blank.analyte().equals(known.analyte());
      if (sameAnalyte && !chain().addUp(blank.unit().dimension(), known.unit().dimension())) {
        faults.add(
            blank.at(),
            fact.word() + " in " + blank.unit() + " beside " + added.word() + " in " + known.unit(),
            known.unit().dimension().words());
      }
    }
  }

  private void reportingLimit() {
    method
        .reportingLimit()
        .all()
        .ifPresent(limit -> limitFits(limit, method.resultUnit().values().toList()));
    method
        .reportingLimit()
        .each()
        .forEach(
            (analyte, limit) ->
                limitFits(limit, method.resultUnit().of(analyte).stream().toList()));
  }

  private void limitFits(Measured limit, List<Unit> results) {
    for (Unit result : results) {
      if (limit.quantity().unit().dimension() != result.dimension()) {
        faults.add(
            root.at("method", "reporting_limit"),
            "reporting_limit of " + limit + " beside a result in " + result,
            result.dimension().words());
      }
    }
  }

  private void workingRange() {
    PerAnalyte<MethodRule.Range> ranges = method.workingRange();
    ranges.all().ifPresent(range -> rangeFits(range, method.resultUnit().values().toList()));
    ranges
        .each()
        .forEach(
            (analyte, range) ->
                rangeFits(range, method.resultUnit().of(analyte).stream().toList()));
  }

  private void rangeFits(MethodRule.Range range, List<Unit> results) {
    for (Unit result : results) {
      if (range.lower().unit().dimension() != result.dimension()) {
        faults.add(
            root.at("method", "working_range"),
            "working_range of " + range + " beside a result in " + result,
            result.dimension().words());
      }
    }
  }
}
