package org.spikewright.app;

import java.util.ArrayList;
import java.util.List;
import java.util.concurrent.ArrayBlockingQueue;
import java.util.concurrent.BlockingQueue;
import org.spikewright.mapping.MappedSink;
import org.spikewright.mapping.Rejection;
import org.spikewright.reading.BatchReading;
import org.spikewright.reading.Reading;

/**
 * Hands what a mapping makes of rows to another sink on a thread of its own, in order, so that
 * recording runs beside decoding. What the other sink throws comes out here. After {@link #close}
 * the other sink is no longer touched.
 */
final class Handover implements MappedSink, AutoCloseable {
  private static final int BATCH = 512;
  private static final int BATCHES_AHEAD = 8;
  private static final List<Object> END = List.of();

  private final MappedSink next;
  private final BlockingQueue<List<Object>> queue = new ArrayBlockingQueue<>(BATCHES_AHEAD);
  private final Thread worker;
  private final List<Rejection> first = new ArrayList<>();
  private List<Object> batch = new ArrayList<>(BATCH);
  private volatile Throwable failure;
  private boolean closed;

  Handover(MappedSink next) {
    this.next = next;
    this.worker = new Thread(this::pass, "record");
    worker.setDaemon(true);
    worker.start();
  }

  @Override
  public void reading(Reading reading) {
    add(reading);
  }

  @Override
  public void batchReading(BatchReading reading) {
    add(reading);
  }

  @Override
  public void rejection(Rejection rejection) {
    if (first.isEmpty()) {
      first.add(rejection);
    }
    add(rejection);
  }

  /** The first rejection, for the words of a refusal; empty when there was none. */
  List<Rejection> first() {
    return first;
  }

  /** Waits until everything was passed on. */
  void finish() {
    put(batch);
    close();
    rethrow();
  }

  /** Lets the other sink go; what was not passed on yet is passed on or forgotten. */
  @Override
  public void close() {
    if (closed) {
      return;
    }
    closed = true;
    put(END);
    boolean interrupted = false;
    while (worker.isAlive()) {
      try {
        worker.join();
      } catch (InterruptedException again) {
        interrupted = true;
      }
    }
    if (interrupted) {
      Thread.currentThread().interrupt();
    }
  }

  private void add(Object mapped) {
    batch.add(mapped);
    if (batch.size() == BATCH) {
      rethrow();
      put(batch);
      batch = new ArrayList<>(BATCH);
    }
  }

  private void put(List<Object> full) {
    boolean interrupted = false;
    while (true) {
      try {
        queue.put(full);
        break;
      } catch (InterruptedException again) {
        interrupted = true;
      }
    }
    if (interrupted) {
      Thread.currentThread().interrupt();
    }
  }

  /** Takes every batch to the end, also after a failure, so that the other side never waits. */
  private void pass() {
    try {
      for (List<Object> full = queue.take(); full != END; full = queue.take()) {
        if (failure == null) {
          pass(full);
        }
      }
    } catch (InterruptedException nobodyInterruptsIt) {
      failure = nobodyInterruptsIt;
    }
  }

  private void pass(List<Object> full) {
    try {
      for (Object mapped : full) {
        if (mapped instanceof Reading reading) {
          next.reading(reading);
        } else if (mapped instanceof BatchReading beside) {
          next.batchReading(beside);
        } else {
          next.rejection((Rejection) mapped);
        }
      }
    } catch (RuntimeException | Error thrown) {
      failure = thrown;
    }
  }

  private void rethrow() {
    if (failure instanceof RuntimeException thrown) {
      throw thrown;
    }
    if (failure instanceof Error thrown) {
      throw thrown;
    }
    if (failure != null) {
      throw new IllegalStateException(failure);
    }
  }
}
