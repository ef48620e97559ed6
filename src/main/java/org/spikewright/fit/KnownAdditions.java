package org.spikewright.fit;

import java.util.List;
import java.util.OptionalDouble;

/**
 * The concentration from an electrode's potentials after known additions to one vessel: E = E_0 +
 * S·log10((C_x·V_x + added amount)/(V_0 + added volume)), or the reason why there is none.
 *
 * <p>Source: Bader, J. Chem. Educ. 57 (1980) 703; Gran, Analyst 77 (1952) 661 (start of the fit).
 */
public sealed interface KnownAdditions {

  /**
   * A concentration. Every number is finite.
   *
   * @param nativeConcentration C_x, above 0, in the unit of the amounts over the volumes
   * @param standardError from the Jacobian at the solution, of the potentials' scatter alone; empty
   *     without degrees of freedom
   * @param lower95 lower end of the profile-likelihood interval; empty without degrees of freedom
   *     and where the data allow any smaller concentration
   * @param upper95 upper end likewise
   * @param slope S in mV per decade; fitted, or the measured one
   * @param slopeStandardError in mV per decade; empty where the slope was not fitted or without
   *     degrees of freedom
   * @param bySlope how far C_x moves for 1 mV per decade more of slope; empty where the slope was
   *     fitted
   * @param theoreticalSlope RT·ln 10/(zF) in mV per decade, negative for anions; empty without a
   *     temperature
   * @param standardPotential E_0 in mV, in the unit of C_x
   * @param residualSd of the potentials about the curve, in mV; empty without degrees of freedom
   * @param df readings less fitted parameters, 0 or more
   */
  record Fitted(
      double nativeConcentration,
      OptionalDouble standardError,
      OptionalDouble lower95,
      OptionalDouble upper95,
      double slope,
      OptionalDouble slopeStandardError,
      OptionalDouble bySlope,
      OptionalDouble theoreticalSlope,
      double standardPotential,
      OptionalDouble residualSd,
      int df)
      implements KnownAdditions {

    /** The t that makes a 95 % interval of a standard error; empty without degrees of freedom. */
    public OptionalDouble t() {
      return df > 0 ? OptionalDouble.of(StudentT.quantile(0.975, df)) : OptionalDouble.empty();
    }

    /** The slope over the theoretical one; empty without a temperature. */
    public OptionalDouble slopeToTheory() {
      return theoreticalSlope.isPresent()
          ? OptionalDouble.of(slope / theoreticalSlope.getAsDouble())
          : theoreticalSlope;
    }
  }

  /**
   * No concentration.
   *
   * @param reason in plain words
   */
  record Refused(String reason) implements KnownAdditions {}

  /**
   * One reading of the vessel.
   *
   * @param amount added in all so far: Σ stock·volume, 0 or more
   * @param volume added in all so far, 0 or more
   * @param potential in mV
   */
  record Reading(double amount, double volume, double potential) {}

  /**
   * The vessel and its electrode.
   *
   * @param aliquot V_x, above 0
   * @param startVolume V_0, the volume before the first addition, at least V_x
   * @param charge of the ion, with its sign; not 0
   * @param kelvin temperature; empty where it is not known, and then the slope is not judged
   * @param measuredSlope in mV per decade, not 0; used where there are fewer than four readings
   */
  record Vessel(
      double aliquot,
      double startVolume,
      int charge,
      OptionalDouble kelvin,
      OptionalDouble measuredSlope) {

    private static final double VOLT_PER_KELVIN = 8.314462618 / 96485.33212;
    private static final double ROOM = 298.15;

    /** Refuses what is out of range or no number: {@link IllegalArgumentException}. */
    public Vessel {
      double slope = measuredSlope.orElse(1);
      if (!(startVolume >= aliquot && aliquot > 0 && startVolume <= 1e75 && aliquot >= 1e-75)
          || !(kelvin.orElse(1) > 0 && kelvin.orElse(1) < 1e6)
          || !(Math.abs(slope) > 1e-6 && Math.abs(slope) < 1e6)
          || charge == 0) {
        throw new IllegalArgumentException(
            aliquot + " in " + startVolume + ", " + charge + ", " + kelvin + ", " + measuredSlope);
      }
    }

    OptionalDouble theoreticalSlope() {
      return kelvin.isPresent() ? OptionalDouble.of(nernst(kelvin.getAsDouble())) : kelvin;
    }

    double expectedSlope() {
      return nernst(kelvin.orElse(ROOM));
    }

    private double nernst(double temperature) {
      return 1000 * Math.log(10) * VOLT_PER_KELVIN * temperature / charge;
    }
  }

  /**
   * Fits E_0, C_x and, with four or more readings, S by Levenberg-Marquardt.
   *
   * @param vessel what the readings are of
   * @param readings of states, replicates averaged; at least one has an addition
   */
  static KnownAdditions fit(Vessel vessel, List<Reading> readings) {
    return new PotentialCurve(vessel, readings).fitted();
  }
}
