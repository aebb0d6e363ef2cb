package org.toprung.budget.app;

import java.io.PrintStream;
import java.io.PrintWriter;
import java.nio.file.Path;
import java.util.Locale;
import java.util.Optional;
import java.util.concurrent.Callable;
import org.toprung.budget.Budget;
import org.toprung.budget.Check;
import org.toprung.budget.report.ChartReport;
import org.toprung.budget.report.JsonReport;
import org.toprung.budget.report.ReportContent;
import org.toprung.budget.report.TextReport;
import org.toprung.budget.scenario.Scenario;
import picocli.CommandLine.Command;
import picocli.CommandLine.Model.CommandSpec;
import picocli.CommandLine.Option;
import picocli.CommandLine.ParameterException;
import picocli.CommandLine.Parameters;
import picocli.CommandLine.Spec;

/** Reads a scenario, composes its budget, checks it by simulation and reports. */
@Command(
    name = "budget",
    description = "Print the error budget of the pulse of a scenario file, checked by simulation.",
    mixinStandardHelpOptions = true,
    versionProvider = Version.class)
final class BudgetCommand implements Callable<Integer> {

  @Spec private CommandSpec spec;

  @Parameters(paramLabel = "SCENARIO", description = "Scenario file (TOML).")
  private Path scenarioFile;

  @Option(names = "--json", paramLabel = "FILE", description = "Also write the report as JSON.")
  private String json;

  @Option(
      names = "--chart",
      paramLabel = "FILE.svg",
      description = "Also draw the causes as a bar chart (SVG).")
  private String chart;

  @Option(
      names = "--shots",
      paramLabel = "N",
      defaultValue = "2000",
      converter = ShotCount.class,
      description = "Shots of the simulation (default: ${DEFAULT-VALUE}).")
  private int shots;

  @Option(
      names = "--seed",
      paramLabel = "S",
      defaultValue = "1",
      description = "Seed of the simulation, any integer (default: ${DEFAULT-VALUE}).")
  private long seed;

  @Option(
      names = "--derivation",
      description = "Also print how the effective Rabi frequency comes about, path by path.")
  private boolean derivation;

  private final PrintStream err;

  BudgetCommand(PrintStream err) {
    this.err = err;
  }

  @Override
  public Integer call() {
    requireAllowed();
    Scenario scenario = Scenario.read(scenarioFile);
    Optional<OutputFile> jsonFile = output("--json", json);
    Optional<OutputFile> chartFile = output("--chart", chart);
    if (chartFile.isPresent()) {
      requireDistinct(jsonFile, chartFile.get());
    }
    Optional<String> working = derivation ? Optional.of(working(scenario)) : Optional.empty();
    Budget budget = scenario.budget();
    ReportContent content = new ReportContent(scenario.title(), budget, check(budget));
    PrintWriter out = spec.commandLine().getOut();
    out.println(TextReport.render(content));
    working.ifPresent(out::println);
    jsonFile.ifPresent(
        file -> {
          file.write(JsonReport.render(content));
          out.println("JSON written to " + file.target());
        });
    chartFile.ifPresent(
        file -> {
          file.write(ChartReport.render(content));
          out.println("Chart written to " + file.target());
        });
    return Main.DONE;
  }

  private void requireAllowed() {
    if (chart != null && !chart.toLowerCase(Locale.ROOT).endsWith(".svg")) {
      throw new ParameterException(
          spec.commandLine(),
          "--chart: given " + chart + "; allowed: a file name that ends in .svg");
    }
  }

  private String working(Scenario scenario) {
    try {
      return scenario.drive().derivation().text();
    } catch (IllegalArgumentException e) {
      throw new ParameterException(spec.commandLine(), "--derivation: " + e.getMessage(), e);
    }
  }

  /** The checked output, which must not take the place of the scenario. */
  private Optional<OutputFile> output(String option, String name) {
    if (name == null) {
      return Optional.empty();
    }
    OutputFile file = OutputFile.of(option, name);
    if (file.isAt(scenarioFile)) {
      throw new BadOutputException(
          option + ": given " + name + ", which is the scenario itself; allowed: another file",
          null);
    }
    return Optional.of(file);
  }

  private static void requireDistinct(Optional<OutputFile> jsonFile, OutputFile chartFile) {
    if (jsonFile.isPresent() && jsonFile.get().isAt(chartFile.target())) {
      throw new BadOutputException(
          "--chart: given "
              + chartFile.target()
              + ", which --json names too; allowed: another file",
          null);
    }
  }

  private Check check(Budget budget) {
    try (Progress progress = new Progress(err, Progress.isTerminal(), shots, System::nanoTime)) {
      return budget.checking().shots(shots).seed(seed).reporting(progress).run();
    }
  }
}
