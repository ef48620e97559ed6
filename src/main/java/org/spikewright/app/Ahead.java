package org.spikewright.app;

import java.util.ArrayList;
import java.util.Iterator;
import java.util.List;
import java.util.NoSuchElementException;
import java.util.concurrent.ArrayBlockingQueue;
import java.util.concurrent.BlockingQueue;

/**
 * Walks a sequence on a thread of its own, a little ahead of whoever takes the elements, in the
 * same order. What the walk throws comes out here. After {@link #close} the sequence is no longer
 * touched.
 *
 * @param <T> the elements
 */
final class Ahead<T> implements Iterator<T>, AutoCloseable {
  private static final int BATCH = 64;
  private static final int BATCHES_AHEAD = 8;

  private final BlockingQueue<List<T>> queue = new ArrayBlockingQueue<>(BATCHES_AHEAD);
  private final Thread worker;
  private Iterator<T> current = List.<T>of().iterator();
  private volatile boolean closed;
  private volatile Throwable failure;
  private boolean ended;

  Ahead(Iterable<T> source) {
    this.worker = new Thread(() -> walk(source), "read ahead");
    worker.setDaemon(true);
    worker.start();
  }

  @Override
  public boolean hasNext() {
    while (!current.hasNext() && !ended) {
      List<T> batch = take();
      ended = batch.isEmpty();
      current = batch.iterator();
    }
    if (ended && failure != null) {
      throw thrown();
    }
    return current.hasNext();
  }

  private RuntimeException thrown() {
    if (failure instanceof Error error) {
      throw error;
    }
    return failure instanceof RuntimeException runtime
        ? runtime
        : new IllegalStateException(failure);
  }

  @Override
  public T next() {
    if (!hasNext()) {
      throw new NoSuchElementException();
    }
    return current.next();
  }

  private List<T> take() {
    try {
      return queue.take();
    } catch (InterruptedException interrupted) {
      Thread.currentThread().interrupt();
      throw new IllegalStateException(interrupted);
    }
  }

  private void walk(Iterable<T> source) {
    try {
      List<T> batch = new ArrayList<>(BATCH);
      for (T element : source) {
        if (closed) {
          return;
        }
        batch.add(element);
        if (batch.size() == BATCH) {
          queue.put(batch);
          batch = new ArrayList<>(BATCH);
        }
      }
      if (!batch.isEmpty()) {
        queue.put(batch);
      }
    } catch (RuntimeException | Error | InterruptedException thrown) {
      failure = thrown;
    }
    end();
  }

  /** An empty batch is the end. */
  private void end() {
    try {
      queue.put(List.of());
    } catch (InterruptedException nobodyWaits) {
      Thread.currentThread().interrupt();
    }
  }

  @Override
  public void close() {
    closed = true;
    boolean interrupted = false;
    while (worker.isAlive()) {
      // The walk may wait for room; what it has put there is no longer wanted.
      queue.clear();
      try {
        worker.join(10);
      } catch (InterruptedException again) {
        interrupted = true;
      }
    }
    if (interrupted) {
      Thread.currentThread().interrupt();
    }
  }
}
