package org.spikewright.app;

import java.io.PrintWriter;
import java.util.List;
import org.slf4j.Logger;
import org.slf4j.LoggerFactory;
import org.spikewright.ledger.LedgerFault;
import org.spikewright.workbook.WriteFault;

/** How a command says that it could not do its work. */
final class Faults {
  private static final Logger LOG = LoggerFactory.getLogger(Faults.class);

  private Faults() {}

  /** The one place where a command's exceptions end. */
  static int report(Exception trouble, PrintWriter err) {
    if (trouble instanceof LedgerFault || trouble instanceof WriteFault) {
      err.println(trouble.getMessage());
      LOG.debug("fault", trouble);
    } else {
      err.println("A fault of the program: " + trouble);
      LOG.error("fault", trouble);
    }
    err.flush();
    return ExitCode.FAULT;
  }

  /** Prints every problem on a line of its own. */
  static int report(int exitCode, List<String> problems, PrintWriter err) {
    problems.forEach(err::println);
    err.flush();
    return exitCode;
  }
}
