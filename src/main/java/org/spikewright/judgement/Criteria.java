package org.spikewright.judgement;

import java.util.Collections;
import java.util.EnumMap;
import java.util.Map;

/**
 * The limits of one method, or of all that set none of their own.
 *
 * @param limits one for each criterion
 */
public record Criteria(Map<Criterion, Limit> limits) {

  /** Takes a copy; {@link IllegalArgumentException} when a criterion is missing. */
  public Criteria {
    limits = Collections.unmodifiableMap(new EnumMap<>(limits));
    if (limits.size() != Criterion.values().length) {
      throw new IllegalArgumentException("limits for " + limits.keySet() + " only");
    }
  }

  /** The limits that hold where the laboratory sets none. */
  public static Criteria defaults() {
    Map<Criterion, Limit> limits = new EnumMap<>(Criterion.class);
    for (Criterion criterion : Criterion.values()) {
      limits.put(criterion, criterion.byDefault());
    }
    return new Criteria(limits);
  }

  /** The limit of a criterion. */
  public Limit of(Criterion criterion) {
    return limits.get(criterion);
  }

  /** The same with another limit. */
  public Criteria with(Criterion criterion, Limit limit) {
    Map<Criterion, Limit> changed = new EnumMap<>(limits);
    changed.put(criterion, limit);
    return new Criteria(changed);
  }
}
