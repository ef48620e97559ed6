package org.spikewright.schedule;

import java.time.Duration;
import java.util.Properties;
import java.util.concurrent.Semaphore;
import java.util.concurrent.TimeUnit;
import java.util.concurrent.atomic.AtomicLong;
import org.quartz.JobBuilder;
import org.quartz.JobDataMap;
import org.quartz.JobDetail;
import org.quartz.Scheduler;
import org.quartz.SchedulerException;
import org.quartz.SimpleScheduleBuilder;
import org.quartz.SimpleTrigger;
import org.quartz.TriggerBuilder;
import org.quartz.TriggerKey;
import org.quartz.impl.StdSchedulerFactory;
import org.slf4j.Logger;
import org.slf4j.LoggerFactory;

/**
 * Wakes tasks at fixed intervals, one after another on one thread: no two tasks run at a time, and
 * wake-ups that fall due while a task runs merge into one. Threads are daemons; nothing listens on
 * the network and nothing is kept on disk.
 *
 * <p>Never a calendar time: a wake-up at 02:30 does not come on the day the clocks go forward, and
 * what falls due while the program is down is forgotten. So a nightly task is woken every minute,
 * and asks its own records what is owed.
 */
public final class Waker implements AutoCloseable {
  private static final Logger LOG = LoggerFactory.getLogger(Waker.class);

  /** Scheduler names are looked up in one table of the whole program. */
  private static final AtomicLong NUMBER = new AtomicLong();

  private final Duration patience;
  private final Scheduler scheduler;

  /** Held by the running task; kept for ever once closed. */
  private final Semaphore turn = new Semaphore(1);

  private volatile boolean closed;

  /** The thread a task runs on now. */
  private volatile Thread running;

  /**
   * Starts with nothing to do.
   *
   * @param patience how long {@link #close} waits for the running task
   */
  public Waker(Duration patience) {
    this.patience = patience;
    try {
      scheduler = new StdSchedulerFactory(settings()).getScheduler();
      scheduler.start();
    } catch (SchedulerException fault) {
      throw new IllegalStateException("the scheduler does not start", fault);
    }
  }

  private static Properties settings() {
    Properties settings = new Properties();
    settings.put("org.quartz.scheduler.instanceName", "spikewright-" + NUMBER.incrementAndGet());
    settings.put("org.quartz.scheduler.skipUpdateCheck", "true");
    settings.put("org.quartz.scheduler.jmx.export", "false");
    settings.put("org.quartz.scheduler.makeSchedulerThreadDaemon", "true");
    settings.put("org.quartz.threadPool.class", "org.quartz.simpl.SimpleThreadPool");
    settings.put("org.quartz.threadPool.threadCount", "1");
    settings.put("org.quartz.threadPool.makeThreadsDaemons", "true");
    settings.put("org.quartz.jobStore.class", "org.quartz.simpl.RAMJobStore");
    // A wake-up this many milliseconds late counts as missed: missed ones merge into one.
    settings.put("org.quartz.jobStore.misfireThreshold", "100");
    return settings;
  }

  /**
   * Wakes a task at once, and then at an interval; what it throws is logged and it is woken again.
   *
   * @param interval at least 1 ms
   * @param what the task's name in the log, such as {@code look into the inbox}; its own
   * @param task what to do; may take longer than the interval
   */
  public void every(Duration interval, String what, Runnable task) {
    Task named = new Task(what, interval, task);
    JobDataMap data = new JobDataMap();
    data.put(WakeUp.TURN, (Runnable) () -> turn(named));
    JobDetail job = JobBuilder.newJob(WakeUp.class).withIdentity(what).setJobData(data).build();
    try {
      scheduler.scheduleJob(job, trigger(what, interval));
    } catch (SchedulerException fault) {
      throw new IllegalStateException("cannot schedule '" + what + "'", fault);
    }
    watch(named);
  }

  private static SimpleTrigger trigger(String what, Duration interval) {
    return TriggerBuilder.newTrigger()
        .withIdentity(what)
        .startNow()
        .withSchedule(
            SimpleScheduleBuilder.simpleSchedule()
                .withIntervalInMilliseconds(interval.toMillis())
                .repeatForever()
                .withMisfireHandlingInstructionNowWithRemainingCount())
        .build();
  }

  /**
   * Starts the thread that notices a clock set back. The scheduler would sleep until the clock has
   * caught up, which may be years; sleeping is not affected by the clock.
   */
  private void watch(Task task) {
    Thread watch = new Thread(() -> keepWatch(task), "watch over " + task.what());
    watch.setDaemon(true);
    watch.start();
  }

  private void keepWatch(Task task) {
    try {
      while (!closed) {
        long seen = task.turns();
        // Twice the interval, and a second for a busy machine.
        Thread.sleep(task.interval().toMillis() * 2 + 1000);
        if (!closed && task.turns() == seen && turn.availablePermits() > 0) {
          LOG.warn(
              "'{}' was not woken in time; was the clock set back? Waking it now.", task.what());
          wakeNow(task);
        }
      }
    } catch (InterruptedException | SchedulerException ended) {
      if (!closed) {
        LOG.warn("nobody watches over '{}' any more", task.what(), ended);
      }
    }
  }

  private void wakeNow(Task task) throws SchedulerException {
    scheduler.rescheduleJob(
        TriggerKey.triggerKey(task.what()), trigger(task.what(), task.interval()));
  }

  /** The scheduler itself, for tests that put its clock wrong. */
  Scheduler scheduler() {
    return scheduler;
  }

  /**
   * Stops waking and waits for the running task; called from a task, it does not wait.
   *
   * @return whether no task runs any more
   */
  public boolean stop(Duration atMost) {
    boolean first = !closed;
    closed = true;
    try {
      if (first) {
        scheduler.shutdown(false);
      }
      if (Thread.currentThread() == running) {
        return false;
      }
      if (turn.tryAcquire(atMost.toMillis(), TimeUnit.MILLISECONDS)) {
        turn.release();
        return true;
      }
    } catch (SchedulerException fault) {
      LOG.warn("the scheduler does not stop", fault);
    } catch (InterruptedException interrupted) {
      Thread.currentThread().interrupt();
    }
    return false;
  }

  /** Stops, and says so when a task still runs after the patience given at the start. */
  @Override
  public void close() {
    if (!stop(patience)) {
      LOG.warn("a task still runs after {} s; it is left to itself", patience.toSeconds());
    }
  }

  /** Gives a task its turn; called on the scheduler's one thread. */
  void turn(Task task) {
    if (!turn.tryAcquire()) {
      return;
    }
    running = Thread.currentThread();
    try {
      if (!closed) {
        task.run();
      }
    } finally {
      running = null;
      turn.release();
    }
  }
}
