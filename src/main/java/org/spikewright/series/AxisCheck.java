package org.spikewright.series;

import java.util.Comparator;
import java.util.HashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.function.Function;
import java.util.function.Predicate;
import java.util.stream.Collectors;
import java.util.stream.Stream;
import org.spikewright.quantity.Dimension;
import org.spikewright.quantity.Measured;
import org.spikewright.quantity.Quantity;
import org.spikewright.quantity.Unit;
import org.spikewright.reading.Addition.OfStock;
import org.spikewright.reading.Addition.Stated;
import org.spikewright.reading.Addition.Terms;
import org.spikewright.reading.FlaskFacts;
import org.spikewright.reading.InternalStandard;
import org.spikewright.reading.Preparation;

/** Whether the facts of a series' flasks fit together, so that {@link Axis} can place them. */
final class AxisCheck {
  /** What is wrong with a series' facts, and what would be right. */
  record Misfit(String found, String expected) {}

  private static final Unit LITRE = Unit.of("L");

  private final List<FlaskDraft> flasks;

  private AxisCheck(List<FlaskDraft> flasks) {
    this.flasks = flasks;
  }

  /** The first thing that keeps the flasks from one axis; empty when nothing does. */
  static Optional<Misfit> misfit(List<FlaskDraft> flasks) {
    AxisCheck check = new AxisCheck(flasks);
    return check
        .differing("design", facts -> facts.design().word())
        .or(() -> check.differing("role", facts -> facts.role().word()))
        .or(() -> check.differing("preparation", FlaskFacts::preparation))
        .or(() -> check.differing("method blank", facts -> facts.blanks().method()))
        .or(() -> check.differing("kind of concentration", AxisCheck::kinds))
        .or(() -> check.differing("unit of the signal", facts -> facts.method().signalUnit()))
        .or(check::internalStandard)
        .or(check::ofDesign)
        .or(check::mixedKinds)
        .or(check::resultUnit);
  }

  /** The dimensions of everything that is added to or taken from a concentration on the axis. */
  private static List<Dimension> kinds(FlaskFacts facts) {
    return Stream.of(
            Stream.of(Axis.unit(facts)),
            facts.addition().portions().stream().map(portion -> portion.stock().quantity().unit()),
            facts.blanks().solvent().stream().map(blank -> blank.quantity().unit()),
            facts.blanks().method().stream().map(blank -> blank.quantity().unit()))
        .flatMap(units -> units)
        .map(Unit::dimension)
        .distinct()
        .toList();
  }

  private Optional<Misfit> mixedKinds() {
    List<Dimension> kinds = kinds(flasks.get(0).facts());
    return kinds.size() == 1
        ? Optional.empty()
        : Optional.of(new Misfit(words(kinds), "stock and blanks of one kind"));
  }

  private Optional<Misfit> ofDesign() {
    return switch (flasks.get(0).facts().design()) {
      case MADE_UP -> madeUp("volume", Dimension.VOLUME);
      case WEIGHED -> madeUp("mass", Dimension.MASS);
      case ONE_VESSEL -> vessel();
      case ELECTRODE -> vessel().or(this::electrode);
      case STATED -> stated();
    };
  }

  private Optional<Misfit> internalStandard() {
    return differing("way of giving the internal standard", AxisCheck::given)
        .or(
            () ->
                VolumeFactor.isWeighedIn(flasks.get(0).facts())
                    ? needs(
                        "a mass of internal standard above 0",
                        f -> isPositive(f.internalStandard().flatMap(InternalStandard::mass)))
                    : Optional.empty());
  }

  private static Optional<String> given(FlaskFacts facts) {
    return facts.internalStandard().map(standard -> standard.given().word());
  }

  private Optional<Misfit> madeUp(String kind, Dimension dimension) {
    return needs("a " + kind + " of stock as its addition", f -> isStock(f, dimension))
        .or(
            () ->
                needs(
                    "an aliquot " + kind + " above 0",
                    f -> isPositive(f.aliquot()) && is(f.aliquot(), dimension)))
        .or(() -> finals(kind, dimension))
        .or(() -> needs(kind + "s that fit into the flask", AxisCheck::fits));
  }

  private static boolean areVolumes(List<OfStock> portions) {
    return !portions.isEmpty()
        && portions.stream().allMatch(p -> p.delivered().unit().dimension() == Dimension.VOLUME);
  }

  private static boolean isStock(FlaskFacts facts, Dimension dimension) {
    return facts.addition() instanceof OfStock spike
        && spike.delivered().unit().dimension() == dimension;
  }

  private Optional<Misfit> finals(String kind, Dimension dimension) {
    long with = flasks.stream().filter(f -> f.facts().finalVolume().isPresent()).count();
    return with == 0
        ? Optional.empty()
        : needs(
            "a final " + kind + " above 0, as other flasks have",
            f -> isPositive(f.finalVolume()) && is(f.finalVolume(), dimension));
  }

  private static boolean is(Optional<Measured> measured, Dimension dimension) {
    return measured.isPresent() && measured.get().quantity().unit().dimension() == dimension;
  }

  private static boolean fits(FlaskFacts facts) {
    if (facts.finalVolume().isEmpty()) {
      return true;
    }
    double total = Axis.inBase(facts.finalVolume().get());
    Measured added = Measured.exactly(facts.addition().amount());
    return Axis.inBase(facts.aliquot().orElseThrow()) + Axis.inBase(added) <= total * (1 + 1e-9);
  }

  private Optional<Misfit> vessel() {
    return needs("a volume of stock as its addition", f -> areVolumes(f.addition().portions()))
        .or(() -> differing("aliquot", FlaskFacts::aliquot))
        .or(() -> differing("start volume", FlaskFacts::startVolume))
        .or(this::stocks)
        .or(this::startVolume);
  }

  /** What each stock brought must be told, and nothing that was added can go away again. */
  private Optional<Misfit> stocks() {
    AxisCheck spiked =
        new AxisCheck(flasks.stream().filter(f -> !f.facts().addition().isNone()).toList());
    return spiked
        .differing("solvent blank", facts -> facts.blanks().solvent())
        .or(
            () ->
                spiked.grows()
                    ? Optional.empty()
                    : Optional.of(
                        new Misfit(
                            "more than one stock: " + spiked.stockWords(),
                            "one stock, or additions = \"each\": a total does not tell what each"
                                + " stock brought")));
  }

  private String stockWords() {
    return flasks.stream()
        .flatMap(flask -> flask.facts().addition().portions().stream())
        .map(portion -> portion.stock().toString())
        .distinct()
        .collect(Collectors.joining(", "));
  }

  private boolean grows() {
    Map<Measured, Double> before = Map.of();
    for (FlaskFacts facts : byAmount()) {
      Map<Measured, Double> now = new HashMap<>();
      for (OfStock portion : facts.addition().portions()) {
        now.merge(portion.stock(), portion.delivered().in(LITRE), Double::sum);
      }
      for (Map.Entry<Measured, Double> earlier : before.entrySet()) {
        if (!(now.getOrDefault(earlier.getKey(), 0.0) >= earlier.getValue() * (1 - 1e-9))) {
          return false;
        }
      }
      before = now;
    }
    return true;
  }

  private List<FlaskFacts> byAmount() {
    return flasks.stream()
        .map(FlaskDraft::facts)
        .sorted(Comparator.comparingDouble(facts -> facts.addition().amount().in(LITRE)))
        .toList();
  }

  private Optional<Misfit> electrode() {
    return needs("the charge of the ion", f -> f.method().electrode().isPresent())
        .or(() -> needs("a potential as its signal", AxisCheck::isPotential));
  }

  private static boolean isPotential(FlaskFacts facts) {
    return facts.internalStandard().isEmpty()
        && facts
            .method()
            .signalUnit()
            .map(Unit::dimension)
            .equals(Optional.of(Dimension.POTENTIAL));
  }

  private Optional<Misfit> startVolume() {
    List<FlaskFacts> facts = flasks.stream().map(FlaskDraft::facts).toList();
    Optional<Quantity> start = Axis.startVolume(facts);
    if (start.isEmpty() || !(start.get().value() > 0)) {
      return Optional.of(
          new Misfit(
              start.map(volume -> "a start volume of " + volume).orElse("no start volume"),
              "the volume in the vessel before the first addition, or the volume at each reading"));
    }
    Optional<Measured> aliquot = facts.get(0).aliquot();
    if (aliquot.isPresent() && !isPositive(aliquot)) {
      return Optional.of(new Misfit("an aliquot of " + aliquot.get(), "an aliquot above 0"));
    }
    if (aliquot.isPresent() && aliquot.get().in(LITRE) > start.get().in(LITRE) * (1 + 1e-9)) {
      return Optional.of(
          new Misfit(
              "an aliquot of " + aliquot.get() + " in a vessel that starts with " + start.get(),
              "a start volume that holds the aliquot"));
    }
    return Optional.empty();
  }

  private Optional<Misfit> stated() {
    return needs("a stated concentration as its addition", f -> f.addition() instanceof Stated)
        .or(
            () ->
                differing("way of stating additions", f -> ((Stated) f.addition()).terms().word()))
        .or(this::flaskTerms);
  }

  private Optional<Misfit> flaskTerms() {
    if (((Stated) flasks.get(0).facts().addition()).terms() == Terms.SAMPLE) {
      return Optional.empty();
    }
    return needs("an aliquot volume above 0", f -> isPositive(f.aliquot()))
        .or(() -> needs("a final volume above 0", f -> isPositive(f.finalVolume())))
        .or(() -> differing("aliquot", FlaskFacts::aliquot))
        .or(() -> differing("final volume", FlaskFacts::finalVolume));
  }

  /** Whether concentration, digest and test portion lead to the unit that the method asks for. */
  private Optional<Misfit> resultUnit() {
    FlaskFacts facts = flasks.get(0).facts();
    Preparation preparation = facts.preparation();
    Unit unit = Axis.unit(facts);
    Unit asked = facts.method().resultUnit();
    if (preparation.testPortion().isPresent() != preparation.digestVolume().isPresent()) {
      return Optional.of(
          new Misfit(
              preparation.testPortion().isPresent()
                  ? "a test portion without a digest volume"
                  : "a digest volume without a test portion",
              "both, or neither"));
    }
    Dimension due =
        preparation
            .testPortion()
            .map(p -> perPortion(unit.dimension(), p))
            .orElse(unit.dimension());
    return due == asked.dimension()
        ? Optional.empty()
        : Optional.of(
            new Misfit(
                "additions in " + unit + ", which lead to " + due.words(),
                "additions that lead to the result unit " + asked));
  }

  private static Dimension perPortion(Dimension solution, Quantity portion) {
    if (portion.unit().dimension() == Dimension.VOLUME) {
      return solution;
    }
    return switch (solution) {
      case MASS_PER_VOLUME -> Dimension.MASS_PER_MASS;
      case AMOUNT_PER_VOLUME -> Dimension.AMOUNT_PER_MASS;
      default -> solution;
    };
  }

  private Optional<Misfit> needs(String what, Predicate<FlaskFacts> holds) {
    if (all(holds)) {
      return Optional.empty();
    }
    String without =
        flasks.stream()
            .filter(flask -> !holds.test(flask.facts()))
            .map(FlaskDraft::label)
            .collect(Collectors.joining(", "));
    return without.isEmpty()
        ? Optional.empty()
        : Optional.of(
            new Misfit("flask " + without + " without " + what, what + " for each flask"));
  }

  /** Whether a fact that a series has once differs from flask to flask; each value is named. */
  private Optional<Misfit> differing(String what, Function<FlaskFacts, ?> fact) {
    if (flasks.isEmpty()) {
      return Optional.empty();
    }
    Object first = fact.apply(flasks.get(0).facts());
    if (all(facts -> fact.apply(facts).equals(first))) {
      return Optional.empty();
    }
    String values =
        flasks.stream()
            .map(flask -> words(fact.apply(flask.facts())))
            .distinct()
            .collect(Collectors.joining(", "));
    return Optional.of(new Misfit("more than one " + what + ": " + values, "one " + what));
  }

  private boolean all(Predicate<FlaskFacts> holds) {
    for (FlaskDraft flask : flasks) {
      if (!holds.test(flask.facts())) {
        return false;
      }
    }
    return true;
  }

  private static String words(Object fact) {
    if (fact instanceof Optional<?> optional) {
      return optional.map(AxisCheck::words).orElse("none");
    }
    if (fact instanceof List<?> several) {
      return several.stream().map(AxisCheck::words).collect(Collectors.joining(" with "));
    }
    if (fact instanceof Dimension dimension) {
      return dimension.words();
    }
    if (fact instanceof Preparation preparation) {
      return preparation.shown().isEmpty() ? "none" : preparation.shown();
    }
    return fact.toString();
  }

  private static boolean isPositive(Optional<Measured> volume) {
    return volume.isPresent() && volume.get().quantity().value() > 0;
  }
}
