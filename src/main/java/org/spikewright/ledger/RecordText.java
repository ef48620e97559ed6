package org.spikewright.ledger;

import java.lang.reflect.InvocationTargetException;
import java.lang.reflect.ParameterizedType;
import java.lang.reflect.RecordComponent;
import java.lang.reflect.Type;
import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;

/**
 * Records of plain numbers as text that gives back every bit: doubles, whole numbers, yes and no,
 * enum constants, arrays of numbers, and records, optional records and lists of records of these.
 * The order of a record's components and the names of enum constants are part of stored ledgers.
 */
final class RecordText {
  private RecordText() {}

  static String encode(Record record) {
    Fields.Writer out = new Fields.Writer();
    write(out, record.getClass(), record);
    return out.toString();
  }

  /** Gives back a record; {@link IllegalStateException} when the text is of another record. */
  static <T extends Record> T decode(Class<T> type, String text) {
    return type.cast(read(new Fields.Reader(text), type));
  }

  private static void write(Fields.Writer out, Type type, Object value) {
    if (value instanceof Double number) {
      out.add(ExactDouble.text(number));
    } else if (value instanceof OptionalDouble number) {
      out.add(number);
    } else if (value instanceof Optional<?> optional) {
      out.add(optional.isPresent() ? "+" : "");
      optional.ifPresent(present -> write(out, argument(type), present));
    } else if (value instanceof List<?> list) {
      out.add(list.size());
      list.forEach(element -> write(out, argument(type), element));
    } else if (value instanceof double[] numbers) {
      out.add(numbers.length);
      for (double number : numbers) {
        out.add(ExactDouble.text(number));
      }
    } else if (value instanceof int[] numbers) {
      out.add(numbers.length);
      for (int number : numbers) {
        out.add(number);
      }
    } else if (value instanceof Enum<?> constant) {
      out.add(constant.name());
    } else if (value instanceof Record record) {
      for (RecordComponent component : record.getClass().getRecordComponents()) {
        write(out, component.getGenericType(), get(component, record));
      }
    } else {
      out.add(value.toString());
    }
  }

  private static Object read(Fields.Reader in, Type type) {
    if (type == double.class || type == Double.class) {
      return ExactDouble.parse(in.text());
    }
    if (type == int.class) {
      return in.number();
    }
    if (type == boolean.class) {
      return Boolean.parseBoolean(in.text());
    }
    if (type == OptionalDouble.class) {
      return in.optionalDouble();
    }
    if (type == double[].class) {
      double[] numbers = new double[in.number()];
      for (int i = 0; i < numbers.length; i++) {
        numbers[i] = ExactDouble.parse(in.text());
      }
      return numbers;
    }
    if (type == int[].class) {
      int[] numbers = new int[in.number()];
      for (int i = 0; i < numbers.length; i++) {
        numbers[i] = in.number();
      }
      return numbers;
    }
    return readObject(in, type);
  }

  private static Object readObject(Fields.Reader in, Type type) {
    Class<?> raw = raw(type);
    if (raw == Optional.class) {
      return in.text().isEmpty() ? Optional.empty() : Optional.of(read(in, argument(type)));
    }
    if (raw == List.class) {
      int size = in.number();
      List<Object> list = new ArrayList<>(size);
      for (int i = 0; i < size; i++) {
        list.add(read(in, argument(type)));
      }
      return List.copyOf(list);
    }
    if (raw.isEnum()) {
      String name = in.text();
      for (Object constant : raw.getEnumConstants()) {
        if (((Enum<?>) constant).name().equals(name)) {
          return constant;
        }
      }
      throw new IllegalStateException("the ledger names " + name + ", no " + raw.getSimpleName());
    }
    if (raw.isRecord()) {
      return record(in, raw);
    }
    throw new IllegalArgumentException("no text for " + type);
  }

  private static Object record(Fields.Reader in, Class<?> type) {
    RecordComponent[] components = type.getRecordComponents();
    Object[] values = new Object[components.length];
    Class<?>[] types = new Class<?>[components.length];
    for (int i = 0; i < components.length; i++) {
      types[i] = components[i].getType();
      values[i] = read(in, components[i].getGenericType());
    }
    try {
      return type.getDeclaredConstructor(types).newInstance(values);
    } catch (ReflectiveOperationException unfit) {
      throw new IllegalStateException("the ledger's text is no " + type.getSimpleName(), unfit);
    }
  }

  private static Object get(RecordComponent component, Record record) {
    try {
      return component.getAccessor().invoke(record);
    } catch (IllegalAccessException | InvocationTargetException broken) {
      throw new IllegalStateException(broken);
    }
  }

  private static Class<?> raw(Type type) {
    return type instanceof ParameterizedType generic
        ? (Class<?>) generic.getRawType()
        : (Class<?>) type;
  }

  private static Type argument(Type type) {
    return ((ParameterizedType) type).getActualTypeArguments()[0];
  }
}
