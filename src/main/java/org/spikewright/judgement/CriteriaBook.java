package org.spikewright.judgement;

import java.util.Map;

/**
 * The limits of all methods of a laboratory.
 *
 * @param general where a method sets none
 * @param methods by the method's name
 * @param repeat what a repeat plan must keep to
 */
public record CriteriaBook(Criteria general, Map<String, Criteria> methods, RepeatCaps repeat) {

  /** Takes a copy. */
  public CriteriaBook {
    methods = Map.copyOf(methods);
  }

  /** Limits with the caps that hold where the laboratory sets none. */
  public CriteriaBook(Criteria general, Map<String, Criteria> methods) {
    this(general, methods, RepeatCaps.DEFAULTS);
  }

  /** The same with other caps of the repeat plan. */
  public CriteriaBook with(RepeatCaps caps) {
    return new CriteriaBook(general, methods, caps);
  }

  /** The limits that hold where the laboratory sets none. */
  public static CriteriaBook defaults() {
    return new CriteriaBook(Criteria.defaults(), Map.of());
  }

  /** The limits of a method. */
  public Criteria of(String method) {
    return methods.getOrDefault(method, general);
  }
}
