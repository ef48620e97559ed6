package org.spikewright.ledger;

import java.util.Map;
import org.spikewright.reading.FlaskFacts;

/** What committed numbers stand for. They never change, so that they may be remembered. */
final class Words {
  private static final int NAMES = 65_536;
  private static final int FACTS = 16_384;

  private final Sql sql;
  private final Map<Long, String> names = new Recent<>(NAMES);
  private final Map<Long, FlaskFacts> facts = new Recent<>(FACTS);

  Words(Sql sql) {
    this.sql = sql;
  }

  String name(long id) {
    String known = names.get(id);
    if (known == null) {
      known = text("SELECT text FROM name WHERE id = ?", id);
      names.put(id, known);
    }
    return known;
  }

  FlaskFacts facts(long id) {
    FlaskFacts known = facts.get(id);
    if (known == null) {
      known = FactsCodec.decode(text("SELECT content FROM flask_facts WHERE id = ?", id));
      facts.put(id, known);
    }
    return known;
  }

  private String text(String select, long id) {
    return sql.first(select, row -> Sql.text(row, 1), id)
        .orElseThrow(() -> new IllegalStateException("the ledger lacks number " + id));
  }
}
