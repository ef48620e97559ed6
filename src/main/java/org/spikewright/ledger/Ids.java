package org.spikewright.ledger;

import java.util.IdentityHashMap;
import java.util.Map;
import org.spikewright.reading.FlaskFacts;
import org.spikewright.reading.Preparation;
import org.spikewright.reading.Subject;

/**
 * The numbers that stand for words, subjects, preparations and facts, given out when first met. The
 * memory of them is bounded and must be forgotten when a transaction is: numbers that were given
 * out in it will stand for other things.
 */
final class Ids {
  /** A number that stands for no word. */
  static final long NONE = 0;

  private static final int WORDS = 65_536;
  private static final int FACTS = 16_384;
  private static final int SAME = 4096;

  private final Sql sql;
  private final Map<String, Long> names = new Recent<>(WORDS);
  private final Map<Subject, Long> subjects = new Recent<>(WORDS);
  private final Map<FlaskFacts, FactsId> facts = new Recent<>(FACTS);
  private final Map<Preparation, Long> preparations = new Recent<>(FACTS);

  /** A mapping gives rows that say the same the same object: that is found without its content. */
  private final Map<Subject, Long> sameSubjects = new IdentityHashMap<>();

  private final Map<FlaskFacts, FactsId> sameFacts = new IdentityHashMap<>();

  /** What stands for facts, and for the preparation among them. */
  record FactsId(long facts, long preparation, boolean spiked) {}

  Ids(Sql sql) {
    this.sql = sql;
  }

  void forget() {
    names.clear();
    subjects.clear();
    facts.clear();
    preparations.clear();
    sameSubjects.clear();
    sameFacts.clear();
  }

  long name(String text) {
    Long known = names.get(text);
    if (known != null) {
      return known;
    }
    long id =
        give(
            "INSERT INTO name (text) VALUES (?) ON CONFLICT (text) DO NOTHING RETURNING id",
            "SELECT id FROM name WHERE text = ?",
            text);
    names.put(text, id);
    return id;
  }

  long subject(Subject subject) {
    Long same = sameSubjects.get(subject);
    if (same == null) {
      same = equalSubject(subject);
      if (sameSubjects.size() >= SAME) {
        sameSubjects.clear();
      }
      sameSubjects.put(subject, same);
    }
    return same;
  }

  private long equalSubject(Subject subject) {
    Long known = subjects.get(subject);
    if (known != null) {
      return known;
    }
    long id =
        give(
            "INSERT INTO subject (sample, analyte, line, instrument) VALUES (?, ?, ?, ?)"
                + " ON CONFLICT (sample, analyte, line, instrument) DO NOTHING RETURNING id",
            "SELECT id FROM subject WHERE sample = ? AND analyte = ? AND line = ?"
                + " AND instrument = ?",
            name(subject.sample().text()),
            name(subject.analyte()),
            name(subject.line()),
            name(subject.instrument()));
    subjects.put(subject, id);
    return id;
  }

  FactsId facts(FlaskFacts flask) {
    FactsId same = sameFacts.get(flask);
    if (same == null) {
      same = equalFacts(flask);
      if (sameFacts.size() >= SAME) {
        sameFacts.clear();
      }
      sameFacts.put(flask, same);
    }
    return same;
  }

  private FactsId equalFacts(FlaskFacts flask) {
    FactsId known = facts.get(flask);
    if (known != null) {
      return known;
    }
    long preparation = preparation(flask.preparation());
    boolean spiked = !flask.addition().isNone();
    String content = FactsCodec.encode(flask);
    long id =
        sql.number(
                "INSERT INTO flask_facts (content, preparation, spiked) VALUES (?, ?, ?)"
                    + " ON CONFLICT (content) DO NOTHING RETURNING id",
                content,
                preparation,
                spiked ? 1 : 0)
            .orElseGet(() -> found("SELECT id FROM flask_facts WHERE content = ?", content));
    FactsId given = new FactsId(id, preparation, spiked);
    facts.put(flask, given);
    return given;
  }

  /** The version of a mapping or of settings. */
  long textVersion(String kind, String name, String sha256, String text) {
    return sql.number(
            "INSERT INTO text_version (kind, name, sha256, text) VALUES (?, ?, ?, ?)"
                + " ON CONFLICT (kind, name, sha256) DO NOTHING RETURNING id",
            kind,
            name,
            sha256,
            text)
        .orElseGet(
            () ->
                found(
                    "SELECT id FROM text_version WHERE kind = ? AND name = ? AND sha256 = ?",
                    kind,
                    name,
                    sha256));
  }

  private long preparation(Preparation preparation) {
    return preparations.computeIfAbsent(
        preparation,
        unknown ->
            give(
                "INSERT INTO preparation (content) VALUES (?)"
                    + " ON CONFLICT (content) DO NOTHING RETURNING id",
                "SELECT id FROM preparation WHERE content = ?",
                FactsCodec.identity(unknown)));
  }

  private long give(String insert, String select, Object... arguments) {
    return sql.number(insert, arguments).orElseGet(() -> found(select, arguments));
  }

  private long found(String select, Object... arguments) {
    return sql.number(select, arguments)
        .orElseThrow(() -> new IllegalStateException("neither added nor found: " + select));
  }
}
