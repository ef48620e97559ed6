package org.spikewright.judgement;

import java.util.Optional;
import java.util.OptionalDouble;
import org.spikewright.fit.Detection;
import org.spikewright.fit.Lent;
import org.spikewright.fit.ModeratedSeries;

/**
 * What a series' numbers become with the variance that its pool lends. On the sample's scale but
 * for {@code series}.
 *
 * @param lender the pool that lends, for people
 * @param lent what it lends
 * @param series the moderated numbers on the axis
 * @param standardError moderated standard error of the result from the fit
 * @param lower95 lower end of the moderated interval; empty when unbounded
 * @param upper95 upper end likewise
 * @param detection critical value and detection limit by the moderated variance
 * @param isReported whether the method reports the moderated interval
 */
public record Borrowed(
    String lender,
    Lent lent,
    ModeratedSeries series,
    OptionalDouble standardError,
    OptionalDouble lower95,
    OptionalDouble upper95,
    Optional<Detection> detection,
    boolean isReported) {}
