package org.spikewright.series;

import java.time.Instant;
import java.util.ArrayList;
import java.util.Collections;
import java.util.HashSet;
import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.Set;
import org.spikewright.quantity.Measured;
import org.spikewright.quantity.Unit;
import org.spikewright.reading.Design;
import org.spikewright.reading.FlaskFacts;
import org.spikewright.reading.MethodFacts;
import org.spikewright.reading.Preparation;
import org.spikewright.reading.Role;

/**
 * The flasks of one sample and analyte on a common axis.
 *
 * @param key its identity
 * @param batchName the batch to show
 * @param role what it was measured for
 * @param design how the additions were made
 * @param preparation what was done before the aliquot
 * @param method what the method says
 * @param axisUnit the unit of every flask's {@code x}
 * @param toSensitivity factor that turns the slope of the line (signal per axis unit) into the
 *     sensitivity: signal per concentration in the measured solution, in base units of the axis
 *     unit's dimension (g/L, mol/L, g/g, mol/g), so that series in different units compare
 * @param toResult how a concentration on the axis becomes the result
 * @param flasks ordered by addition, then label; at least one
 * @param notes remarks from the gathering
 * @param lastReadingAt the time of its last reading, or of its last arrival where no time is mapped
 * @param timed whether times of measurement are mapped
 */
public record AdditionSeries(
    SeriesKey key,
    String batchName,
    Role role,
    Design design,
    Preparation preparation,
    MethodFacts method,
    Unit axisUnit,
    double toSensitivity,
    ToResult toResult,
    List<Flask> flasks,
    List<SeriesNote> notes,
    Instant lastReadingAt,
    boolean timed)
    implements Gathered {

  /**
   * The volumes of one vessel, in L.
   *
   * @param aliquot V_x
   * @param start V_0, before the first addition
   */
  public record Vessel(double aliquot, double start) {
    /** The volume added to the vessel up to a state of it, in L. */
    public static double added(Flask flask) {
      return Axis.inBase(Measured.exactly(flask.facts().addition().amount()));
    }
  }

  /** The volumes of the vessel; empty in designs with a flask for each addition. */
  public Optional<Vessel> vessel() {
    if (!design.isVessel()) {
      return Optional.empty();
    }
    List<FlaskFacts> facts = flasks.stream().map(Flask::facts).toList();
    return Axis.startVolume(facts)
        .map(Measured::exactly)
        .map(
            start ->
                new Vessel(Axis.inBase(facts.get(0).aliquot().orElse(start)), Axis.inBase(start)));
  }

  /** The flasks that take part in the fit, in order. */
  public List<Flask> usableFlasks() {
    List<Flask> usable = new ArrayList<>(flasks.size());
    for (Flask flask : flasks) {
      if (flask.isUsable()) {
        usable.add(flask);
      }
    }
    return Collections.unmodifiableList(usable);
  }

  /** The flasks that were measured a second time, as a series of their own; empty when none was. */
  public Optional<AdditionSeries> secondRun() {
    List<Flask> second =
        flasks.stream().filter(flask -> !flask.secondRun().isEmpty()).map(Flask::second).toList();
    return second.isEmpty()
        ? Optional.empty()
        : Optional.of(
            new AdditionSeries(
                key,
                batchName,
                role,
                design,
                preparation,
                method,
                axisUnit,
                toSensitivity,
                toResult,
                second,
                List.of(),
                lastReadingAt,
                timed));
  }

  /**
   * How many flasks were prepared of those that take part in the fit: fewer than its points where
   * each reading counts as a flask.
   */
  public int preparedFlasks() {
    Set<String> prepared = new HashSet<>();
    for (Flask flask : flasks) {
      if (flask.isUsable()) {
        prepared.add(flask.readings().get(0).reading().flask());
      }
    }
    return prepared.size();
  }

  /**
   * The matrix factor: the sensitivity in this matrix over that of the calibration by which the
   * instrument read concentrations back; 1 where the matrix changes nothing.
   *
   * @param slope of the line, in read-back concentration per axis unit
   * @return empty where signals are no concentrations
   */
  public OptionalDouble matrixFactor(double slope) {
    Optional<Unit> readBack =
        method.signalUnit().filter(unit -> unit.dimension() == axisUnit.dimension());
    return readBack.isPresent()
        ? OptionalDouble.of(slope * toSensitivity * readBack.get().perBase())
        : OptionalDouble.empty();
  }

  /** The number of readings, of all flasks, that count. */
  public int readings() {
    int readings = 0;
    for (Flask flask : flasks) {
      readings += flask.readings().size();
    }
    return readings;
  }

  /** The time of its first reading, where times are mapped. */
  public Optional<Instant> startedAt() {
    return flasks.stream()
        .flatMap(flask -> flask.readings().stream())
        .flatMap(recorded -> recorded.reading().measuredAt().stream())
        .min(Instant::compareTo);
  }
}
