package org.spikewright.config;

import java.util.List;
import java.util.Optional;
import org.spikewright.mapping.Fact;
import org.spikewright.mapping.MethodRule;
import org.spikewright.mapping.Places;
import org.spikewright.quantity.Dimension;
import org.spikewright.quantity.Unit;
import org.spikewright.reading.Addition;
import org.spikewright.reading.Design;
import org.spikewright.reading.InternalStandard.Given;

/** Whether a mapping names what its design needs, and nothing that belongs to another. */
final class DesignCheck {
  private static final List<Fact> VOLUMES =
      List.of(Fact.ADDITION_VOLUME, Fact.ALIQUOT_VOLUME, Fact.FINAL_VOLUME);
  private static final List<Fact> MASSES =
      List.of(Fact.ADDITION_MASS, Fact.ALIQUOT_MASS, Fact.FINAL_MASS);

  private final Requirements needs;
  private final MethodRule method;
  private final Places places;
  private final String word;

  DesignCheck(Requirements needs, MethodRule method, Places places) {
    this.needs = needs;
    this.method = method;
    this.places = places;
    this.word = "design \"" + method.design().word() + "\"";
  }

  void check() {
    switch (method.design()) {
      case MADE_UP, WEIGHED -> madeUp();
      case ONE_VESSEL, ELECTRODE -> vessel();
      case STATED -> stated();
    }
    if (method.design() != Design.STATED) {
      needs.refuse(
          Fact.ADDITION,
          "with " + word,
          method.additionFact().word() + " and stock, or design \"stated\"");
      needs.refuseKey("fixed", "addition_terms", "without design \"stated\"", "it only there");
    }
    if (!method.design().isVessel()) {
      needs.refuseKey(
          "fixed", "additions", "without design \"one vessel\" or \"electrode\"", "it only there");
      needs.refuse(
          Fact.START_VOLUME, "with " + word, "it only with design \"one vessel\" or \"electrode\"");
    }
    for (Fact fact : method.design() == Design.WEIGHED ? VOLUMES : MASSES) {
      needs.refuse(
          fact,
          "with " + word,
          method.design() == Design.WEIGHED
              ? "masses: addition_mass, aliquot_mass, final_mass"
              : "it only with design \"weighed\"");
    }
    standard();
    electrode();
  }

  private void madeUp() {
    needs.require(method.additionFact(), word + " needs it");
    needs.require(Fact.STOCK, word + " needs it");
    needs.require(method.aliquotFact(), word + " needs it");
    boolean cancelled =
        method.signal().standard().filter(given -> given != Given.ON_LINE).isPresent();
    if (!cancelled) {
      boolean weighed = method.design() == Design.WEIGHED;
      needs.require(
          weighed ? Fact.FINAL_MASS : Fact.FINAL_VOLUME,
          word + " needs it: " + (weighed ? "all that is in the flask" : "the mark of the flasks"));
    }
  }

  private void stated() {
    needs.require(Fact.ADDITION, word + " needs it");
    for (Fact fact : List.of(Fact.ADDITION_VOLUME, Fact.STOCK, Fact.SOLVENT_BLANK)) {
      needs.refuse(fact, "with " + word, "addition, the concentration that the bench states");
    }
    if (!needs.fixedHas("addition_terms")) {
      needs.missingKey(
          "fixed",
          "addition_terms",
          "\"flask\" (added concentration in the measured flask) or \"sample\" (referred to the"
              + " aliquot)");
    } else if (method.terms().equals(Optional.of(Addition.Terms.FLASK))) {
      String why = "additions in flask terms need it to be referred to the sample";
      needs.require(Fact.ALIQUOT_VOLUME, why);
      needs.require(Fact.FINAL_VOLUME, why);
    }
  }

  private void vessel() {
    needs.require(Fact.ADDITION_VOLUME, word + " needs it");
    needs.require(Fact.STOCK, word + " needs it");
    needs.require(Fact.ALIQUOT_VOLUME, word + " needs it");
    if (!needs.fixedHas("additions")) {
      needs.missingKey(
          "fixed",
          "additions",
          "\"each\" (addition_volume is what the step added) or \"cumulative\" (all added so far)");
    }
    if (method.sumsSteps() && !needs.has(Fact.FLASK)) {
      needs.refuseKey(
          "fixed",
          "additions",
          "= \"each\" without flask",
          "flask in [columns] or [label]: it tells a new step from another reading of the same");
    }
    boolean finalRead = places.isRead(Fact.FINAL_VOLUME);
    if (!needs.has(Fact.START_VOLUME) && !finalRead) {
      needs.require(
          Fact.START_VOLUME,
          word
              + " needs it: the volume before the first addition; or map final_volume, the volume"
              + " at each reading");
    }
    if (!finalRead) {
      needs.refuse(
          Fact.FINAL_VOLUME,
          "in [fixed] with " + word,
          "start_volume there; the volume grows with each addition");
    }
  }

  private void standard() {
    Optional<Given> given = method.signal().standard();
    if (!needs.has(Fact.INTERNAL_STANDARD)) {
      String alone = "without internal_standard";
      String expected = "internal_standard in [columns]: the column of its signal";
      needs.refuseKey("fixed", "internal_standard_given", alone, expected);
      needs.refuse(Fact.INTERNAL_STANDARD_BASELINE, alone, expected);
      needs.refuse(Fact.INTERNAL_STANDARD_MASS, alone, expected);
      return;
    }
    if (!needs.fixedHas("internal_standard_given")) {
      needs.missingKey(
          "fixed",
          "internal_standard_given",
          "\"in the flask\" (the same amount in every flask, or once in the vessel), \"weighed"
              + " in\" or \"on line\"");
    }
    if (given.equals(Optional.of(Given.WEIGHED_IN))) {
      needs.require(
          Fact.INTERNAL_STANDARD_MASS, "an internal standard that is weighed in needs it");
      if (method.design() != Design.MADE_UP && method.design() != Design.WEIGHED) {
        needs.refuseKey(
            "fixed",
            "internal_standard_given",
            "= \"weighed in\" with " + word,
            "\"in the flask\" (once in the vessel) or \"on line\"");
      }
    } else {
      needs.refuse(
          Fact.INTERNAL_STANDARD_MASS,
          "without internal_standard_given = \"weighed in\"",
          "it only there");
    }
    if (method.design() == Design.ELECTRODE || method.signal().unit().isPresent()) {
      needs.refuse(
          Fact.INTERNAL_STANDARD,
          method.design() == Design.ELECTRODE ? "with " + word : "with signal_unit",
          "a plain signal beside it");
    }
  }

  private void electrode() {
    boolean potential = method.design() == Design.ELECTRODE;
    Optional<Dimension> read = method.signal().unit().map(Unit::dimension);
    if (!potential) {
      String elsewhere = "without design \"electrode\"";
      for (String key : List.of("charge", "slope", "temperature")) {
        needs.refuseKey("method", key, elsewhere, "it only there");
      }
      if (read.equals(Optional.of(Dimension.POTENTIAL))) {
        needs.refuseKey(
            "fixed", "signal_unit", "of a potential " + elsewhere, "the unit of a concentration");
      }
      return;
    }
    if (!needs.methodHas("charge")) {
      needs.missingKey("method", "charge", "the charge of the ion with its sign, such as -1");
    }
    if (!needs.fixedHas("signal_unit")) {
      needs.missingKey("fixed", "signal_unit", "\"mV\" or \"V\"");
    } else if (read.isPresent() && read.get() != Dimension.POTENTIAL) {
      needs.refuseKey(
          "fixed", "signal_unit", "that is no potential with " + word, "\"mV\" or \"V\"");
    }
  }
}
