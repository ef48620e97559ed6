package org.spikewright.judgement;

import java.util.Map;

/**
 * The limits of all methods of a laboratory.
 *
 * @param general where a method sets none
 * @param methods by the method's name
 */
public record CriteriaBook(Criteria general, Map<String, Criteria> methods) {

  /** Takes a copy. */
  public CriteriaBook {
    methods = Map.copyOf(methods);
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
