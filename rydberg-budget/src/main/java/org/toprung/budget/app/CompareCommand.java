package org.toprung.budget.app;

import java.io.PrintWriter;
import java.nio.file.Path;
import java.util.concurrent.Callable;
import java.util.stream.Stream;
import org.toprung.budget.report.ComparedBudget;
import org.toprung.budget.report.ComparisonReport;
import org.toprung.budget.scenario.Scenario;
import picocli.CommandLine.Command;
import picocli.CommandLine.Model.CommandSpec;
import picocli.CommandLine.Option;
import picocli.CommandLine.Parameters;
import picocli.CommandLine.Spec;

/** Reads two scenarios and tells which causes moved from one to the other. */
@Command(
    name = "compare",
    description =
        "Print which causes moved between the budgets of two scenario files, without simulation.",
    mixinStandardHelpOptions = true,
    versionProvider = Version.class)
final class CompareCommand implements Callable<Integer> {

  @Spec private CommandSpec spec;

  @Parameters(index = "0", paramLabel = "BEFORE", description = "Scenario file (TOML).")
  private Path beforeFile;

  @Parameters(index = "1", paramLabel = "AFTER", description = "Scenario file (TOML).")
  private Path afterFile;

  @Option(
      names = "--markdown",
      paramLabel = "FILE",
      description = "Also write the comparison as Markdown.")
  private String markdown;

  @Override
  public Integer call() {
    Scenario before = Scenario.read(beforeFile);
    Scenario after = Scenario.read(afterFile);
    Outputs<ComparisonReport> outputs =
        new Outputs<>(Stream.concat(before.files().stream(), after.files().stream()).toList());
    outputs.add("--markdown", markdown, "Markdown", ComparisonReport::markdown);
    ComparisonReport report =
        ComparisonReport.between(
            new ComparedBudget(before.title(), before.budget()),
            new ComparedBudget(after.title(), after.budget()));
    PrintWriter out = spec.commandLine().getOut();
    out.println(report.text());
    outputs.write(report, out);
    return Main.DONE;
  }
}
