package org.toprung.budget.app;

import java.io.PrintWriter;
import java.io.UncheckedIOException;
import java.nio.file.Path;
import java.util.List;
import java.util.Locale;
import java.util.concurrent.Callable;
import org.toprung.core.atom.Catalogue;
import org.toprung.core.structure.Audit;
import picocli.CommandLine.Command;
import picocli.CommandLine.Model.CommandSpec;
import picocli.CommandLine.Option;
import picocli.CommandLine.ParameterException;
import picocli.CommandLine.Spec;

/** Compares the values of the catalogue with each other. */
@Command(
    name = "audit",
    description =
        "Tie the atomic values together: lifetimes with elements, series and potentials with levels,"
            + " masses with Rydberg constants, splittings and hyperfine constants; worst first.",
    mixinStandardHelpOptions = true,
    versionProvider = Version.class)
final class AuditCommand implements Callable<Integer> {
  private static final double SUSPICIOUS_SIGMAS = 3;
  private static final String ROW = "%-7s %-26s %-15s %15s %15s %-5s %7.2f %8.2g%%  %s%n";
  private static final String HEAD = "%-7s %-26s %-15s %15s %15s %-5s %7s %9s  %s%n";

  @Spec private CommandSpec spec;

  @Option(
      names = "--values",
      paramLabel = "FILE",
      description = "A file of your own values, laid over those of the library (CSV).")
  private List<Path> files = List.of();

  @Option(
      names = "--rows",
      paramLabel = "N",
      defaultValue = "40",
      description = "Comparisons shown, the worst ones (default: ${DEFAULT-VALUE}).")
  private int rows;

  @Override
  public Integer call() {
    if (rows < 1) {
      throw new ParameterException(spec.commandLine(), "--rows must be at least 1, given " + rows);
    }
    List<Audit.Finding> findings = Audit.of(catalogue()).findings();
    long suspicious = findings.stream().filter(f -> f.sigmas() > SUSPICIOUS_SIGMAS).count();
    PrintWriter out = spec.commandLine().getOut();
    out.printf(
        Locale.ROOT,
        "%d comparisons, %d of them beyond %.0f standard deviations. Worst first.%n%n",
        findings.size(),
        suspicious,
        SUSPICIOUS_SIGMAS);
    out.printf(
        Locale.ROOT,
        HEAD,
        "species",
        "derived",
        "of",
        "derived",
        "compared with",
        "unit",
        "sigma",
        "relative",
        "row");
    for (Audit.Finding finding : findings.subList(0, Math.min(rows, findings.size()))) {
      out.printf(
          Locale.ROOT,
          ROW,
          finding.species(),
          finding.check().description(),
          finding.subject(),
          String.format(Locale.ROOT, "%.9g", finding.derived()),
          String.format(Locale.ROOT, "%.9g", finding.reference()),
          finding.unit(),
          finding.sigmas(),
          100 * finding.relative(),
          finding.origin());
    }
    out.flush();
    return Main.DONE;
  }

  private Catalogue catalogue() {
    Catalogue catalogue = Catalogue.bundled();
    for (Path file : files) {
      try {
        catalogue = catalogue.with(file);
      } catch (IllegalArgumentException | UncheckedIOException e) {
        throw new ParameterException(spec.commandLine(), e.getMessage(), e);
      }
    }
    return catalogue;
  }
}
