package org.spikewright.ledger;

import java.util.Iterator;
import java.util.List;
import java.util.NoSuchElementException;
import java.util.Optional;
import java.util.function.Function;

/**
 * A long list fetched page by page, so that no cursor stays open when a walk ends early, and every
 * walk begins anew.
 *
 * @param pages gives the page after an element, or the first page; an empty page ends the walk
 */
record Pages<T>(Function<Optional<T>, List<T>> pages) implements Iterable<T> {

  @Override
  public Iterator<T> iterator() {
    return new Walk<>(pages);
  }

  private static final class Walk<T> implements Iterator<T> {
    private final Function<Optional<T>, List<T>> pages;
    private List<T> page;
    private int next;

    Walk(Function<Optional<T>, List<T>> pages) {
      this.pages = pages;
      this.page = pages.apply(Optional.empty());
    }

    @Override
    public boolean hasNext() {
      if (next == page.size() && next > 0) {
        page = pages.apply(Optional.of(page.get(next - 1)));
        next = 0;
      }
      return next < page.size();
    }

    @Override
    public T next() {
      if (!hasNext()) {
        throw new NoSuchElementException();
      }
      return page.get(next++);
    }
  }
}
