package org.spikewright.summary;

import java.util.Iterator;
import java.util.List;
import java.util.NoSuchElementException;
import java.util.function.Function;
import java.util.function.Predicate;

/** Sequences that are made while they are walked. */
final class Lazily {
  private Lazily() {}

  /** Each element as something else. */
  static <A, B> Iterable<B> map(Iterable<A> source, Function<? super A, ? extends B> each) {
    return () -> {
      Iterator<A> walk = source.iterator();
      return new Iterator<>() {
        @Override
        public boolean hasNext() {
          return walk.hasNext();
        }

        @Override
        public B next() {
          return each.apply(walk.next());
        }
      };
    };
  }

  /** Some elements as something else. */
  static <A, B> Iterable<B> some(
      Iterable<A> source, Predicate<? super A> wanted, Function<? super A, ? extends B> each) {
    return flatMap(
        source, element -> wanted.test(element) ? List.of(each.apply(element)) : List.of());
  }

  /** Each element as several; no more than one element's are held. */
  static <A, B> Iterable<B> flatMap(Iterable<A> source, Function<? super A, List<B>> each) {
    return () -> new Flat<>(source.iterator(), each);
  }

  private static final class Flat<A, B> implements Iterator<B> {
    private final Iterator<A> source;
    private final Function<? super A, List<B>> each;
    private Iterator<B> current = List.<B>of().iterator();

    Flat(Iterator<A> source, Function<? super A, List<B>> each) {
      this.source = source;
      this.each = each;
    }

    @Override
    public boolean hasNext() {
      while (!current.hasNext() && source.hasNext()) {
        current = each.apply(source.next()).iterator();
      }
      return current.hasNext();
    }

    @Override
    public B next() {
      if (!hasNext()) {
        throw new NoSuchElementException();
      }
      return current.next();
    }
  }
}
