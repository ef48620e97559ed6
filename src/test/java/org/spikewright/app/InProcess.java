package org.spikewright.app;

import java.io.ByteArrayOutputStream;
import java.io.PrintStream;
import java.nio.charset.StandardCharsets;
import org.spikewright.testkit.Program;

/** The command line within the test's own process, where a process of its own is not the point. */
final class InProcess {
  private InProcess() {}

  static Program.Ended run(String... args) {
    PrintStream out = System.out;
    PrintStream err = System.err;
    ByteArrayOutputStream said = new ByteArrayOutputStream();
    ByteArrayOutputStream complained = new ByteArrayOutputStream();
    System.setOut(new PrintStream(said, true, StandardCharsets.UTF_8));
    System.setErr(new PrintStream(complained, true, StandardCharsets.UTF_8));
    try {
      int code = Main.run(args);
      return new Program.Ended(
          code, said.toString(StandardCharsets.UTF_8), complained.toString(StandardCharsets.UTF_8));
    } finally {
      System.setOut(out);
      System.setErr(err);
    }
  }

  /** {@code once} on the folder as it stands, with further options. */
  static Program.Ended once(String conf, String... more) {
    String[] args = new String[more.length + 5];
    System.arraycopy(new String[] {"once", "--settle", "0s", "--conf", conf}, 0, args, 0, 5);
    System.arraycopy(more, 0, args, 5, more.length);
    return run(args);
  }

  /** The newest results of every lab day, as CSV. */
  static String results(String conf) {
    Program.Ended ended = run("results", "--conf", conf);
    if (ended.code() != ExitCode.DONE) {
      throw new AssertionError("results ended with " + ended);
    }
    return ended.out();
  }
}
