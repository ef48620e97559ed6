package org.spikewright.ledger;

import java.sql.PreparedStatement;
import java.sql.SQLException;
import java.sql.Types;
import java.util.Optional;
import java.util.OptionalDouble;
import org.spikewright.reading.Signal;
import org.spikewright.reading.Spread;

/**
 * A reading as numbers, on its way into the ledger.
 *
 * @param subject whose signal
 * @param at milliseconds; 0 when untimed
 * @param batch 0 when timed
 * @param delimitedBy the timed batch that delimits its series; 0 when none does
 */
record NewRow(
    long subject,
    long at,
    long batch,
    long preparation,
    long flask,
    long replicate,
    Signal signal,
    long facts,
    long origin,
    long line,
    long delimitedBy) {

  /** Parts a mean's text from its spread; the last two of them count, whatever the text holds. */
  private static final char BEHIND = '\u001f';

  static final String INSERT =
      "INSERT INTO reading (subject, read_at, batch, preparation, flask, replicate, nth,"
          + " signal, state, text, facts, origin, line_no, standard)"
          + " VALUES (?, ?, ?, ?, ?, ?, ?, ?, ?, ?, ?, ?, ?, ?) ON CONFLICT DO NOTHING";

  /** The order of the primary key: rows that lie together are written together. */
  static int byKey(NewRow one, NewRow other) {
    if (one.subject != other.subject) {
      return Long.compare(one.subject, other.subject);
    }
    if (one.at != other.at) {
      return Long.compare(one.at, other.at);
    }
    if (one.batch != other.batch) {
      return Long.compare(one.batch, other.batch);
    }
    if (one.preparation != other.preparation) {
      return Long.compare(one.preparation, other.preparation);
    }
    return one.flask != other.flask
        ? Long.compare(one.flask, other.flask)
        : Long.compare(one.replicate, other.replicate);
  }

  boolean timed() {
    return batch == Ids.NONE;
  }

  void bind(PreparedStatement insert, int nth) throws SQLException {
    insert.setLong(1, subject);
    insert.setLong(2, at);
    insert.setLong(3, batch);
    insert.setLong(4, preparation);
    insert.setLong(5, flask);
    insert.setLong(6, replicate);
    insert.setInt(7, nth);
    if (signal instanceof Signal.Value number) {
      insert.setDouble(8, number.value());
    } else {
      insert.setNull(8, Types.DOUBLE);
    }
    insert.setInt(9, state(signal));
    insert.setString(10, text(signal));
    insert.setLong(11, facts);
    insert.setLong(12, origin);
    insert.setLong(13, line);
    OptionalDouble standard = standard(signal);
    if (standard.isPresent()) {
      insert.setDouble(14, standard.getAsDouble());
    } else {
      insert.setNull(14, Types.DOUBLE);
    }
  }

  /** The internal standard's signal, where there is one. */
  static OptionalDouble standard(Signal signal) {
    return signal instanceof Signal.Value number ? number.standard() : OptionalDouble.empty();
  }

  /** 0 for a number, 4 for a number that is a mean with a spread. */
  static int state(Signal signal) {
    if (signal instanceof Signal.NoNumber word) {
      return switch (word.state()) {
        case OVER_RANGE -> 1;
        case BELOW_RANGE -> 2;
        case MISSING -> 3;
      };
    }
    return signal instanceof Signal.Value value && value.spread().isPresent() ? 4 : 0;
  }

  /** The text as stored; behind that of a mean stand its spread and the number of readings. */
  static String text(Signal signal) {
    String text = StoredText.encode(signal.text());
    return signal instanceof Signal.Value value && value.spread().isPresent()
        ? text + spread(value.spread().get())
        : text;
  }

  /** A spread as it is stored behind the text. */
  static String spread(Spread spread) {
    return BEHIND + ExactDouble.text(spread.sd()) + BEHIND + spread.readings();
  }

  static Signal signal(int state, double value, String text, OptionalDouble standard) {
    return switch (state) {
      case 0 -> new Signal.Value(value, text, standard, Optional.empty());
      case 1 -> new Signal.NoNumber(Signal.State.OVER_RANGE, text);
      case 2 -> new Signal.NoNumber(Signal.State.BELOW_RANGE, text);
      case 3 -> new Signal.NoNumber(Signal.State.MISSING, text);
      case 4 -> mean(value, text);
      default -> throw new IllegalStateException("no signal state " + state);
    };
  }

  private static Signal mean(double value, String text) {
    int readings = text.lastIndexOf(BEHIND);
    int sd = text.lastIndexOf(BEHIND, readings - 1);
    Spread spread =
        new Spread(
            ExactDouble.parse(text.substring(sd + 1, readings)),
            Integer.parseInt(text.substring(readings + 1)));
    return new Signal.Value(
        value, text.substring(0, sd), OptionalDouble.empty(), Optional.of(spread));
  }
}
