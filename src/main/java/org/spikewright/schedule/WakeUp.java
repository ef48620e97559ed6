package org.spikewright.schedule;

import org.quartz.DisallowConcurrentExecution;
import org.quartz.Job;
import org.quartz.JobExecutionContext;

/** What the scheduler makes anew for each wake-up: it only passes the turn on. */
@DisallowConcurrentExecution
public final class WakeUp implements Job {
  static final String TURN = "turn";

  @Override
  public void execute(JobExecutionContext context) {
    ((Runnable) context.getJobDetail().getJobDataMap().get(TURN)).run();
  }
}
