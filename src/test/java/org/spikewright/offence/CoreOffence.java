package org.spikewright.offence;

import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.time.Clock;
import java.util.concurrent.ExecutorService;
import java.util.logging.Logger;
import org.apache.commons.math3.special.Gamma;
import org.slf4j.LoggerFactory;
import org.spikewright.fit.NoLine;
import org.spikewright.quantity.Unit;

/** What a class of the functional core must not know, and one type that its row allows. */
public final class CoreOffence {
  private CoreOffence() {}

  static String file(Path path) throws IOException {
    return Files.readString(path);
  }

  static void thread(Runnable work) {
    new Thread(work).start();
  }

  static long clock(Clock clock) {
    return clock.millis();
  }

  static void executor(ExecutorService executor) {
    executor.shutdown();
  }

  static void logging(Logger logger) {
    logger.info("");
  }

  static void slf4j() {
    org.slf4j.Logger logger = LoggerFactory.getLogger("offence");
    logger.info("");
  }

  static double library(double value) {
    return Gamma.logGamma(value);
  }

  static NoLine otherPackage() {
    return new NoLine("");
  }

  static String fine(Unit unit) {
    return unit.toString();
  }
}
