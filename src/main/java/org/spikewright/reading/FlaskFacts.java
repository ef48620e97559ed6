package org.spikewright.reading;

import java.util.Optional;
import org.spikewright.quantity.Measured;

/**
 * Everything known about a flask but its signal. Equal for all readings of a flask, and mostly
 * equal for the same flask position of many samples, so that it is stored once.
 *
 * @param role what the row was measured for
 * @param design how the additions were made
 * @param addition what was added
 * @param aliquot the volume of sample solution in the flask; its mass where it was weighed
 * @param finalVolume the volume measured: the mark, or in one vessel the volume at this reading;
 *     the total mass where it was weighed; empty when it follows from the other facts
 * @param startVolume one vessel: the volume before the first addition
 * @param preparation what was done before the aliquot
 * @param blanks the blanks that apply
 * @param method what the method says about the series
 * @param internalStandard the internal standard whose signal divides the analyte's, where there is
 *     one
 * @param accuracies how well the quantities are known
 * @param bottle the named stock that the addition is of, where it has a name
 */
public record FlaskFacts(
    Role role,
    Design design,
    Addition addition,
    Optional<Measured> aliquot,
    Optional<Measured> finalVolume,
    Optional<Measured> startVolume,
    Preparation preparation,
    Blanks blanks,
    MethodFacts method,
    Optional<InternalStandard> internalStandard,
    Accuracies accuracies,
    Optional<Bottle> bottle) {

  /** Facts without a named stock. */
  public FlaskFacts(
      Role role,
      Design design,
      Addition addition,
      Optional<Measured> aliquot,
      Optional<Measured> finalVolume,
      Optional<Measured> startVolume,
      Preparation preparation,
      Blanks blanks,
      MethodFacts method,
      Optional<InternalStandard> internalStandard,
      Accuracies accuracies) {
    this(
        role,
        design,
        addition,
        aliquot,
        finalVolume,
        startVolume,
        preparation,
        blanks,
        method,
        internalStandard,
        accuracies,
        Optional.empty());
  }

  /** Facts without an internal standard and without declared accuracies. */
  public FlaskFacts(
      Role role,
      Design design,
      Addition addition,
      Optional<Measured> aliquot,
      Optional<Measured> finalVolume,
      Optional<Measured> startVolume,
      Preparation preparation,
      Blanks blanks,
      MethodFacts method) {
    this(
        role,
        design,
        addition,
        aliquot,
        finalVolume,
        startVolume,
        preparation,
        blanks,
        method,
        Optional.empty(),
        Accuracies.NONE);
  }

  /** The same with another addition. */
  public FlaskFacts with(Addition other) {
    return new FlaskFacts(
        role,
        design,
        other,
        aliquot,
        finalVolume,
        startVolume,
        preparation,
        blanks,
        method,
        internalStandard,
        accuracies,
        bottle);
  }
}
