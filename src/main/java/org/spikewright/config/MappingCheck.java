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
import org.spikewright.reading.Addition;
import org.spikewright.reading.Design;

/** Whether the parts of a mapping, each in order by itself, make sense together. */
final class MappingCheck {
  private static final List<Fact> ALWAYS = List.of(Fact.SAMPLE, Fact.ANALYTE, Fact.SIGNAL);

  private final Section root;
  private final Faults faults;
  private final Named named;
  private final MethodRule method;
  private final Places places;

  MappingCheck(Section root, Named named, MethodRule method, Places places) {
    this.root = root;
    this.faults = root.faults();
    this.named = named;
    this.method = method;
    this.places = places;
  }

  void check() {
    ALWAYS.forEach(fact -> require(fact, "every reading needs it"));
    if (fixedHas("design")) {
      design();
    }
    means();
    together(Fact.TEST_PORTION, Fact.DIGEST_VOLUME);
    together(Fact.DIGEST_VOLUME, Fact.TEST_PORTION);
    if (named.has(Fact.DRY_MASS) && !named.has(Fact.TEST_PORTION)) {
      refuse(Fact.DRY_MASS, "without test_portion", "test_portion and digest_volume beside it");
    }
    units();
  }

  private void means() {
    together(Fact.SIGNAL_SD, Fact.READINGS);
    together(Fact.READINGS, Fact.SIGNAL_SD);
    if (named.has(Fact.SIGNAL_SD) && method.fitReadings()) {
      refuse(
          Fact.SIGNAL_SD,
          "beside unit = \"reading\" in [method]",
          "unit = \"flask\": of readings whose mean alone is known none can be a point");
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

  private void design() {
    String word = "design \"" + method.design().word() + "\"";
    if (method.design() == Design.STATED) {
      stated(word);
    } else {
      spiked(word);
    }
    boolean vessel = method.design() == Design.ONE_VESSEL;
    if (vessel) {
      vessel(word);
    } else {
      refuseKey("additions", "without design \"one vessel\"");
      if (named.has(Fact.START_VOLUME)) {
        refuse(Fact.START_VOLUME, "with " + word, "it only with design \"one vessel\"");
      }
    }
  }

  private void stated(String word) {
    require(Fact.ADDITION, word + " needs it");
    for (Fact fact : List.of(Fact.ADDITION_VOLUME, Fact.STOCK, Fact.SOLVENT_BLANK)) {
      if (named.has(fact)) {
        refuse(fact, "with " + word, "addition, the concentration that the bench states");
      }
    }
    if (!fixedHas("addition_terms")) {
      missingKey(
          "addition_terms",
          "\"flask\" (added concentration in the measured flask) or \"sample\" (referred to the"
              + " aliquot)");
    } else if (method.terms().equals(Optional.of(Addition.Terms.FLASK))) {
      String why = "additions in flask terms need it to be referred to the sample";
      require(Fact.ALIQUOT_VOLUME, why);
      require(Fact.FINAL_VOLUME, why);
    }
  }

  private void spiked(String word) {
    require(Fact.ADDITION_VOLUME, word + " needs it");
    require(Fact.STOCK, word + " needs it");
    require(Fact.ALIQUOT_VOLUME, word + " needs it");
    if (method.design() == Design.MADE_UP) {
      require(Fact.FINAL_VOLUME, word + " needs it: the mark of the flasks");
    }
    if (named.has(Fact.ADDITION)) {
      refuse(Fact.ADDITION, "with " + word, "addition_volume and stock, or design \"stated\"");
    }
    refuseKey("addition_terms", "without design \"stated\"");
  }

  private void vessel(String word) {
    if (!fixedHas("additions")) {
      missingKey(
          "additions",
          "\"each\" (addition_volume is what the step added) or \"cumulative\" (all added so far)");
    }
    if (method.additions().equals(Optional.of(MethodRule.Additions.EACH))
        && !named.has(Fact.FLASK)) {
      faults.add(
          root.at("fixed", "additions"),
          "additions = \"each\" without flask",
          "flask in [columns] or [label]: it tells a new step from another reading of the same");
    }
    boolean finalRead = places.isRead(Fact.FINAL_VOLUME);
    if (!named.has(Fact.START_VOLUME) && !finalRead) {
      require(
          Fact.START_VOLUME,
          word
              + " needs it: the volume before the first addition; or map final_volume, the volume"
              + " at each reading");
    }
    if (named.has(Fact.FINAL_VOLUME) && !finalRead) {
      refuse(
          Fact.FINAL_VOLUME,
          "in [fixed] with " + word,
          "start_volume there; the volume grows with each addition");
    }
  }

  private void together(Fact one, Fact other) {
    if (named.has(one) && !named.has(other)) {
      refuse(one, "without " + other.word(), other.word() + " beside it");
    }
  }

  private void units() {
    Fact added = method.design() == Design.STATED ? Fact.ADDITION : Fact.STOCK;
    for (Named.Known known : named.units(added)) {
      result(added, known);
      like(Fact.METHOD_BLANK, added, known);
      like(Fact.SOLVENT_BLANK, added, known);
    }
    reportingLimit();
  }

  private void result(Fact added, Named.Known known) {
    List<Named.Known> portions = named.units(Fact.TEST_PORTION);
    // A portion whose unit only the rows tell is checked row by row.
    if (named.has(Fact.TEST_PORTION) && portions.isEmpty()) {
      return;
    }
    Optional<Dimension> portion =
        portions.stream().findFirst().map(unit -> unit.unit().dimension());
    List<Unit> results =
        known.analyte().isPresent()
            ? method.resultUnit().of(known.analyte().get()).stream().toList()
            : method.resultUnit().values().toList();
    for (Unit result : results) {
      Optional<String> fault = Chain.fault(known.unit().dimension(), portion, result.dimension());
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
      if (sameAnalyte && blank.unit().dimension() != known.unit().dimension()) {
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

  private boolean fixedHas(String key) {
    return root.has("fixed", key);
  }

  private void require(Fact fact, String why) {
    boolean explained =
        List.of("[columns]", "[fixed]", "[label]", "[layout]", "[block]", "[sheet]", "[file]")
            .stream()
            .anyMatch(section -> faults.isExplained(section, fact.word()));
    if (!named.has(fact) && !explained) {
      faults.add(
          root.at("columns"),
          "no "
              + fact.word()
              + " in [columns], [layout], [label], [block], [sheet], [file]"
              + (MappingKeys.fixable().contains(fact) ? " or [fixed]" : ""),
          fact.expectation() + "; " + why);
    }
  }

  private void refuse(Fact fact, String found, String expected) {
    faults.add(named.at(fact), fact.word() + " " + found, expected);
  }

  private void missingKey(String key, String expected) {
    faults.missing(root.at("fixed"), "[fixed]", key, expected);
  }

  private void refuseKey(String key, String found) {
    if (fixedHas(key)) {
      faults.add(root.at("fixed", key), key + " " + found, "it only there");
    }
  }
}
