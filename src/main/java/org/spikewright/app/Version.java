package org.spikewright.app;

import java.util.Optional;

/** The program's version, as the jar's manifest has it. */
final class Version {
  /** {@code development} when the program runs from its class files. */
  static final String NUMBER =
      Optional.ofNullable(Version.class.getPackage().getImplementationVersion())
          .orElse("development");

  private Version() {}
}
