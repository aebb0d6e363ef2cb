package org.toprung.budget.app;

import java.io.FileDescriptor;
import java.io.FileOutputStream;
import java.io.PrintStream;
import java.io.PrintWriter;
import java.nio.charset.StandardCharsets;
import org.toprung.budget.scenario.ScenarioException;
import picocli.CommandLine;
import picocli.CommandLine.Command;
import picocli.CommandLine.Model.CommandSpec;
import picocli.CommandLine.ParameterException;
import picocli.CommandLine.Spec;

/**
 * The command line. Exit status: {@value #DONE} done, {@value #BAD_INPUT} bad input (one line on
 * standard error), {@value #FAILED} anything that is not the user's fault.
 */
@Command(
    name = "toprung",
    description = "Error budgets of laser pulses from a ground sublevel to a Rydberg sublevel.",
    mixinStandardHelpOptions = true,
    versionProvider = Version.class)
public final class Main implements Runnable {
  static final int DONE = 0;
  static final int FAILED = 1;
  static final int BAD_INPUT = 2;

  @Spec private CommandSpec spec;

  private Main() {}

  /**
   * Runs the command line and ends the process with its exit status.
   *
   * @param args the arguments
   */
  public static void main(String[] args) {
    PrintStream out = utf8(FileDescriptor.out);
    PrintStream err = utf8(FileDescriptor.err);
    int status = run(args, out, err);
    out.flush();
    err.flush();
    System.exit(status);
  }

  private static PrintStream utf8(FileDescriptor descriptor) {
    return new PrintStream(new FileOutputStream(descriptor), true, StandardCharsets.UTF_8);
  }

  /**
   * Runs the command line.
   *
   * @param args the arguments
   * @param out receives reports and help
   * @param err receives complaints and progress
   * @return the exit status
   */
  static int run(String[] args, PrintStream out, PrintStream err) {
    return new CommandLine(new Main())
        .addSubcommand(new BudgetCommand(err))
        .addSubcommand(new CompareCommand())
        .addSubcommand(new AuditCommand())
        .setOut(new PrintWriter(out, true, StandardCharsets.UTF_8))
        .setErr(new PrintWriter(err, true, StandardCharsets.UTF_8))
        .setParameterExceptionHandler((e, arguments) -> refuse(err, e.getMessage(), e))
        .setExecutionExceptionHandler(
            (e, command, result) -> {
              if (e instanceof ScenarioException || e instanceof BadOutputException) {
                return refuse(err, e.getMessage(), null);
              }
              err.println("toprung: internal error: " + e);
              e.printStackTrace(err);
              return FAILED;
            })
        .execute(args);
  }

  private static int refuse(PrintStream err, String message, ParameterException parameter) {
    String help = "";
    if (parameter != null) {
      help = "; see: " + parameter.getCommandLine().getCommandSpec().qualifiedName() + " --help";
    }
    err.println("toprung: " + message.strip().replaceAll("\\R+", "; ") + help);
    return BAD_INPUT;
  }

  @Override
  public void run() {
    throw new ParameterException(
        spec.commandLine(), "a command is missing; allowed: " + spec.subcommands().keySet());
  }
}
