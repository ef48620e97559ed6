package org.spikewright.judgement;

import java.util.List;
import org.spikewright.series.AdditionSeries;

/** What stands around a series when it is judged: its pool, and the controls of its batch. */
public interface Around {

  /** A series alone. */
  Around NOTHING =
      new Around() {
        @Override
        public PoolView pool(AdditionSeries series) {
          return PoolView.ALONE;
        }

        @Override
        public List<Flag> flags(AdditionSeries series, SeriesResult result) {
          return List.of();
        }
      };

  /** The pool of a series. */
  PoolView pool(AdditionSeries series);

  /** What controls, blanks and other series of the sample say of it. */
  List<Flag> flags(AdditionSeries series, SeriesResult result);
}
