package org.spikewright.config;

import java.util.Arrays;
import java.util.EnumMap;
import java.util.HashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.stream.Stream;
import org.spikewright.judgement.Criteria;
import org.spikewright.judgement.CriteriaBook;
import org.spikewright.judgement.Criterion;
import org.spikewright.judgement.Flag.LimitSource;
import org.spikewright.judgement.Limit;

/**
 * Reads {@code [criteria]}: each key a number, or a table with limit, on, source and reason; under
 * {@code [criteria.method."name"]} the same for one method.
 */
final class CriteriaSection {
  /** The limits, and a table with limits for each method that sets its own. */
  static final List<String> KEYS =
      Stream.concat(Arrays.stream(Criterion.values()).map(Criterion::key), Stream.of("method"))
          .toList();

  private static final List<String> OWN_KEYS = KEYS.subList(0, KEYS.size() - 1);

  static final List<String> LIMIT_KEYS = List.of("limit", "on", "source", "reason");

  private static final Map<String, LimitSource> SOURCES =
      Section.words(LimitSource.values(), LimitSource::words);

  private final Section section;

  private CriteriaSection(Section section) {
    this.section = section;
  }

  static CriteriaBook book(Section section) {
    Criteria general = new CriteriaSection(section).over(Criteria.defaults());
    Map<String, Criteria> methods = new HashMap<>();
    Optional<Section> each = section.openSection("method");
    if (each.isPresent()) {
      for (String method : each.get().keys()) {
        each.get()
            .section(method, OWN_KEYS)
            .ifPresent(own -> methods.put(method, new CriteriaSection(own).over(general)));
      }
    }
    return new CriteriaBook(general, methods);
  }

  private Criteria over(Criteria general) {
    Map<Criterion, Limit> limits = new EnumMap<>(Criterion.class);
    for (Criterion criterion : Criterion.values()) {
      limits.put(criterion, limit(criterion.key(), general.of(criterion), criterion.most()));
    }
    Criteria criteria = new Criteria(limits);
    inOrder(Criterion.BEND_TO_REVIEW, Criterion.BEND_TO_REPEAT, criteria);
    inOrder(Criterion.LARGE_TOP_ADDITION, Criterion.LARGEST_TOP_ADDITION, criteria);
    inOrder(Criterion.ELECTRODE_SLOPE_LEAST, Criterion.ELECTRODE_SLOPE_MOST, criteria);
    return criteria;
  }

  private void inOrder(Criterion lower, Criterion upper, Criteria criteria) {
    inOrder(lower.key(), criteria.of(lower), upper.key(), criteria.of(upper));
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
