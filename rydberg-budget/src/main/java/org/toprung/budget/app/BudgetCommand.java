package org.toprung.budget.app;

import java.io.PrintStream;
import java.io.PrintWriter;
import java.nio.file.Path;
import java.util.Locale;
import java.util.Optional;
import java.util.concurrent.Callable;
import org.toprung.budget.Budget;
import org.toprung.budget.Check;
import org.toprung.budget.CheckSetup;
import org.toprung.budget.report.ChartReport;
import org.toprung.budget.report.CsvReport;
import org.toprung.budget.report.FilterChart;
import org.toprung.budget.report.JsonReport;
import org.toprung.budget.report.MarkdownReport;
import org.toprung.budget.report.ProgramReport;
import org.toprung.budget.report.ReportContent;
import org.toprung.budget.report.TextReport;
import org.toprung.budget.scenario.Scenario;
import org.toprung.core.quantity.Time;
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
      names = "--markdown",
      paramLabel = "FILE",
      description = "Also write the report as Markdown.")
  private String markdown;

  @Option(
      names = "--csv",
      paramLabel = "FILE",
      description = "Also write the causes as comma-separated values, one row each.")
  private String csv;

  @Option(
      names = "--chart",
      paramLabel = "FILE.svg",
      description = "Also draw the causes as a bar chart (SVG).")
  private String chart;

  @Option(
      names = "--filter-chart",
      paramLabel = "FILE.svg",
      description =
          "Also draw how the pulse filters noise, over the noise densities of the scenario (SVG).")
  private String filterChart;

  @Option(
      names = "--program",
      paramLabel = "FILE.csv",
      description =
          "Also write what the sequencer plays: fields, detuning and phase over time, in slices.")
  private String program;

  @Option(
      names = "--slice",
      paramLabel = "TIME",
      converter = SliceLength.class,
      description =
          "Longest slice of --program where anything changes, such as \"2 ns\" (default: 1/500 of"
              + " the pulse).")
  private Time slice;

  @Option(
      names = "--shots",
      paramLabel = "N",
      defaultValue = "2000",
      converter = ShotCount.class,
      description = "Shots of each simulation (default: ${DEFAULT-VALUE}).")
  private int shots;

  @Option(
      names = "--seed",
      paramLabel = "S",
      defaultValue = "1",
      description = "Seed of the simulation, any integer (default: ${DEFAULT-VALUE}).")
  private long seed;

  @Option(
      names = "--total-only",
      description = "Simulate all causes together only, not each alone as well: much faster.")
  private boolean totalOnly;

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
    Outputs<ReportContent> outputs = outputs(scenario);
    Optional<String> working = derivation ? Optional.of(working(scenario)) : Optional.empty();
    Budget budget = scenario.budget();
    requireSlices(budget);
    ReportContent content = new ReportContent(scenario.title(), budget, check(budget));
    PrintWriter out = spec.commandLine().getOut();
    out.println(TextReport.render(content));
    working.ifPresent(out::println);
    outputs.write(content, out);
    return Main.DONE;
  }

  private void requireAllowed() {
    requireEnding("--chart", chart, ".svg");
    requireEnding("--filter-chart", filterChart, ".svg");
    requireEnding("--program", program, ".csv");
    if (slice != null && program == null) {
      throw refused("--slice: given without --program; allowed: both together", null);
    }
  }

  private void requireEnding(String option, String name, String ending) {
    if (name != null && !name.toLowerCase(Locale.ROOT).endsWith(ending)) {
      throw refused(
          option + ": given " + name + "; allowed: a file name that ends in " + ending, null);
    }
  }

  private ParameterException refused(String message, Exception cause) {
    return new ParameterException(spec.commandLine(), message, cause);
  }

  private Outputs<ReportContent> outputs(Scenario scenario) {
    Outputs<ReportContent> outputs = new Outputs<>(scenario.files());
    outputs.add("--json", json, "JSON", JsonReport::render);
    outputs.add("--markdown", markdown, "Markdown", MarkdownReport::render);
    outputs.add("--csv", csv, "Table of causes", CsvReport::render);
    outputs.add("--chart", chart, "Chart", ChartReport::render);
    outputs.add("--filter-chart", filterChart, "Filter chart", FilterChart::render);
    outputs.add("--program", program, "Program", content -> played(content.budget()));
    return outputs;
  }

  private String played(Budget budget) {
    return slice == null ? ProgramReport.render(budget) : ProgramReport.render(budget, slice);
  }

  /** Refuses slices that do not fit the pulse before the simulation begins. */
  private void requireSlices(Budget budget) {
    try {
      if (slice != null) {
        budget.program().slices(slice);
      }
    } catch (IllegalArgumentException e) {
      throw refused("--slice: " + e.getMessage(), e);
    }
  }

  private String working(Scenario scenario) {
    try {
      return scenario.drive().derivation().text();
    } catch (IllegalArgumentException e) {
      throw refused("--derivation: " + e.getMessage(), e);
    }
  }

  private Check check(Budget budget) {
    CheckSetup every = budget.checking().shots(shots).seed(seed);
    CheckSetup setup = totalOnly ? every.totalOnly() : every;
    try (Progress progress =
        new Progress(err, Progress.isTerminal(), setup.plannedShots(), System::nanoTime)) {
      return setup.reporting(progress).run();
    } catch (ArithmeticException e) {
      throw refused(scenarioFile + ": no simulation: " + e.getMessage(), e);
    }
  }
}
