package org.spikewright.analysis;

import java.util.List;
import java.util.Map;
import java.util.Optional;
import org.spikewright.fit.ControlLimits;

/**
 * What controls came to on earlier lab days.
 *
 * @param points by control, oldest first
 */
public record ControlHistory(Map<ControlKey, List<ControlPoint>> points) {
  /** The latest points that limits are drawn from. */
  public static final int MOST = 100;

  /** No earlier lab day. */
  public static final ControlHistory NONE = new ControlHistory(Map.of());

  /** Copies the map. */
  public ControlHistory {
    points = Map.copyOf(points);
  }

  /** The latest points of a control in one unit, oldest first. */
  public List<ControlPoint> of(ControlKey key, String unit) {
    List<ControlPoint> all =
        points.getOrDefault(key, List.of()).stream().filter(p -> p.unit().equals(unit)).toList();
    return all.subList(Math.max(0, all.size() - MOST), all.size());
  }

  /** Limits about the mean of the latest points. */
  public Optional<ControlLimits> limits(ControlKey key, String unit) {
    return ControlLimits.of(values(key, unit));
  }

  /** The values of the latest points. */
  double[] values(ControlKey key, String unit) {
    return of(key, unit).stream().mapToDouble(ControlPoint::value).toArray();
  }
}
