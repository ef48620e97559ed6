package org.spikewright.ledger;

import java.util.ArrayList;
import java.util.List;
import java.util.OptionalDouble;

/** A record as one text: fields divided by tabs, read back in the order they were written. */
final class Fields {
  private static final char DIVIDER = '\t';
  private static final char ESCAPE = '\\';

  private Fields() {}

  /** Writes fields. */
  static final class Writer {
    private final StringBuilder text = new StringBuilder(96);
    private boolean begun;

    Writer add(String field) {
      if (begun) {
        text.append(DIVIDER);
      }
      begun = true;
      for (int i = 0; i < field.length(); i++) {
        char c = field.charAt(i);
        if (c == ESCAPE || c == DIVIDER) {
          text.append(ESCAPE).append(c == DIVIDER ? 't' : ESCAPE);
        } else {
          text.append(c);
        }
      }
      return this;
    }

    Writer add(int field) {
      return add(Integer.toString(field));
    }

    Writer add(OptionalDouble field) {
      return add(field.isPresent() ? ExactDouble.text(field.getAsDouble()) : "");
    }

    Writer add(List<String> fields) {
      add(fields.size());
      fields.forEach(this::add);
      return this;
    }

    @Override
    public String toString() {
      return text.toString();
    }
  }

  /** Reads fields; {@link IllegalStateException} when there are fewer than asked for. */
  static final class Reader {
    private final String text;
    private int next;

    Reader(String text) {
      this.text = text;
    }

    String text() {
      if (next > text.length()) {
        throw new IllegalStateException("too few fields in: " + text);
      }
      int end = text.indexOf(DIVIDER, next);
      String field = text.substring(next, end < 0 ? text.length() : end);
      next = end < 0 ? text.length() + 1 : end + 1;
      return field.indexOf(ESCAPE) < 0 ? field : unescaped(field);
    }

    int number() {
      return Integer.parseInt(text());
    }

    OptionalDouble optionalDouble() {
      String field = text();
      return field.isEmpty() ? OptionalDouble.empty() : OptionalDouble.of(ExactDouble.parse(field));
    }

    List<String> list() {
      int size = number();
      List<String> fields = new ArrayList<>(size);
      for (int i = 0; i < size; i++) {
        fields.add(text());
      }
      return List.copyOf(fields);
    }

    private static String unescaped(String field) {
      StringBuilder plain = new StringBuilder(field.length());
      for (int i = 0; i < field.length(); i++) {
        char c = field.charAt(i);
        if (c == ESCAPE) {
          c = field.charAt(++i) == 't' ? DIVIDER : ESCAPE;
        }
        plain.append(c);
      }
      return plain.toString();
    }
  }
}
