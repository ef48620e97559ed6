package org.spikewright.config;

import java.util.List;
import java.util.Map;
import java.util.Optional;
import org.spikewright.judgement.Criteria;
import org.spikewright.judgement.Flag.LimitSource;
import org.spikewright.judgement.Limit;

/** Reads {@code [criteria]}: each key a number, or a table with limit, on, source and reason. */
final class CriteriaSection {
  static final List<String> KEYS =
      List.of(
          "false_alarms",
          "bend_to_review",
          "bend_to_repeat",
          "least_correlation",
          "least_top_addition",
          "large_top_addition",
          "largest_top_addition",
          "target_uncertainty");

  static final List<String> LIMIT_KEYS = List.of("limit", "on", "source", "reason");

  private static final Map<String, LimitSource> SOURCES =
      Section.words(LimitSource.values(), LimitSource::words);

  private final Section section;

  private CriteriaSection(Section section) {
    this.section = section;
  }

  static Criteria criteria(Section section) {
    return new CriteriaSection(section).criteria();
  }

  private Criteria criteria() {
    Criteria byDefault = Criteria.defaults();
    Criteria criteria =
        new Criteria(
            limit("false_alarms", byDefault.falseAlarms(), 0.5),
            limit("bend_to_review", byDefault.bendToReview(), 10),
            limit("bend_to_repeat", byDefault.bendToRepeat(), 10),
            limit("least_correlation", byDefault.leastCorrelation(), 1),
            limit("least_top_addition", byDefault.leastTopAddition(), 1000),
            limit("large_top_addition", byDefault.largeTopAddition(), 1000),
            limit("largest_top_addition", byDefault.largestTopAddition(), 1000),
            limit("target_uncertainty", byDefault.targetUncertainty(), 10));
    inOrder("bend_to_review", criteria.bendToReview(), "bend_to_repeat", criteria.bendToRepeat());
    inOrder(
        "large_top_addition",
        criteria.largeTopAddition(),
        "largest_top_addition",
        criteria.largestTopAddition());
    return criteria;
  }

  private void inOrder(String lower, Limit least, String upper, Limit most) {
    if (!(least.value() <= most.value())) {
      String key = section.has(lower) ? lower : upper;
      section.fault(
          key,
          lower + " of " + least.value() + " above " + upper + " of " + most.value(),
          lower + " at most as large as " + upper);
    }
  }

  private Limit limit(String key, Limit byDefault, double most) {
    Optional<Object> value = section.value(key);
    if (value.isEmpty()) {
      return byDefault;
    }
    String expected = "a number above 0 and at most " + most;
    if (value.get() instanceof Number) {
      double limit = bounded(section, key, expected, most).orElse(byDefault.value());
      return new Limit(limit, true, LimitSource.LABORATORY, "set in the configuration");
    }
    if (!(value.get() instanceof org.tomlj.TomlTable)) {
      section.wrongType(key, value.get(), expected + ", or a table with " + LIMIT_KEYS);
      return byDefault;
    }
    Section own = section.section(key, LIMIT_KEYS).orElseThrow();
    Optional<Double> limit = bounded(own, "limit", expected, most);
    boolean changed = own.has("limit");
    return new Limit(
        limit.orElse(byDefault.value()),
        own.yesOrNo("on").orElse(byDefault.on()),
        own.oneOf("source", SOURCES).orElse(changed ? LimitSource.LABORATORY : byDefault.source()),
        own.text("reason", "the reason in words")
            .orElse(changed ? "set in the configuration" : byDefault.reason()));
  }

  private static Optional<Double> bounded(Section where, String key, String expected, double most) {
    Optional<Double> number = where.number(key, expected);
    if (number.isPresent() && !(number.get() > 0 && number.get() <= most)) {
      where.fault(key, number.get() + " for " + where.named(key), expected);
      return Optional.empty();
    }
    return number;
  }
}
