package org.toprung;

import static com.tngtech.archunit.lang.syntax.ArchRuleDefinition.fields;
import static com.tngtech.archunit.lang.syntax.ArchRuleDefinition.noClasses;
import static com.tngtech.archunit.library.Architectures.layeredArchitecture;

import com.tngtech.archunit.core.domain.JavaClasses;
import com.tngtech.archunit.core.importer.ClassFileImporter;
import com.tngtech.archunit.core.importer.ImportOption;
import com.tngtech.archunit.library.dependencies.SlicesRuleDefinition;
import org.junit.jupiter.api.Test;

/** The arrows of the layout: data flows one way. */
class ArchitectureTest {
  private static final JavaClasses CLASSES =
      new ClassFileImporter()
          .withImportOption(new ImportOption.DoNotIncludeTests())
          .importPackages("org.toprung");

  @Test
  void flowsOneWayFromQuantityToApp() {
    layeredArchitecture()
        .consideringOnlyDependenciesInAnyPackage("org.toprung..")
        .layer("angular")
        .definedBy("org.toprung.angular..")
        .layer("quantity")
        .definedBy("org.toprung.core.quantity")
        .layer("cache")
        .definedBy("org.toprung.core.cache")
        .layer("atom")
        .definedBy("org.toprung.core.atom")
        .layer("radial")
        .definedBy("org.toprung.core.radial")
        .layer("structure")
        .definedBy("org.toprung.core.structure")
        .layer("linear")
        .definedBy("org.toprung.core.linear")
        .layer("drive")
        .definedBy("org.toprung.core.drive")
        .layer("bench")
        .definedBy("org.toprung.budget.bench")
        .layer("pulse")
        .definedBy("org.toprung.budget.pulse")
        .layer("dynamics")
        .definedBy("org.toprung.budget.dynamics")
        .layer("response")
        .definedBy("org.toprung.budget.response")
        .layer("cause")
        .definedBy("org.toprung.budget.cause")
        .layer("budget")
        .definedBy("org.toprung.budget")
        .layer("scenario")
        .definedBy("org.toprung.budget.scenario")
        .layer("report")
        .definedBy("org.toprung.budget.report")
        .layer("app")
        .definedBy("org.toprung.budget.app")
        .whereLayer("angular")
        .mayNotAccessAnyLayer()
        .whereLayer("quantity")
        .mayNotAccessAnyLayer()
        .whereLayer("cache")
        .mayNotAccessAnyLayer()
        .whereLayer("linear")
        .mayNotAccessAnyLayer()
        .whereLayer("atom")
        .mayOnlyAccessLayers("quantity", "angular", "cache")
        .whereLayer("radial")
        .mayOnlyAccessLayers("quantity", "angular", "cache", "atom")
        .whereLayer("structure")
        .mayOnlyAccessLayers("quantity", "angular", "cache", "atom", "radial")
        .whereLayer("drive")
        .mayOnlyAccessLayers("quantity", "angular", "atom", "structure", "linear")
        .whereLayer("bench")
        .mayOnlyAccessLayers("quantity")
        .whereLayer("pulse")
        .mayOnlyAccessLayers("quantity")
        .whereLayer("dynamics")
        .mayOnlyAccessLayers(
            "quantity", "angular", "atom", "structure", "drive", "linear", "bench", "pulse")
        .whereLayer("response")
        .mayOnlyAccessLayers("quantity", "drive", "linear", "bench", "pulse", "dynamics")
        .whereLayer("cause")
        .mayOnlyBeAccessedByLayers("budget")
        .whereLayer("budget")
        .mayOnlyBeAccessedByLayers("scenario", "report", "app")
        .whereLayer("scenario")
        .mayOnlyBeAccessedByLayers("report", "app")
        .whereLayer("report")
        .mayOnlyBeAccessedByLayers("app")
        .whereLayer("app")
        .mayNotBeAccessedByAnyLayer()
        .check(CLASSES);
  }

  @Test
  void hasNoCyclesBetweenPackages() {
    SlicesRuleDefinition.slices()
        .matching("org.toprung.(**)")
        .should()
        .beFreeOfCycles()
        .check(CLASSES);
  }

  @Test
  void keepsNoMutableStatics() {
    fields()
        .that()
        .areStatic()
        .and()
        .areDeclaredInClassesThat()
        .resideInAPackage("org.toprung..")
        .should()
        .beFinal()
        .check(CLASSES);
  }

  /** Only the app writes to the terminal; libraries answer their callers. */
  @Test
  void printsNowhereButInTheApp() {
    noClasses()
        .that()
        .resideOutsideOfPackage("org.toprung.budget.app")
        .should()
        .accessField(System.class, "out")
        .orShould()
        .accessField(System.class, "err")
        .check(CLASSES);
  }

  /** What only the command line needs stays out of the library. */
  @Test
  void keepsOptionalLibrariesInTheOuterPackages() {
    noClasses()
        .that()
        .resideOutsideOfPackages(
            "org.toprung.budget.scenario", "org.toprung.budget.report", "org.toprung.budget.app")
        .should()
        .dependOnClassesThat()
        .resideInAnyPackage("com.fasterxml..", "picocli..")
        .check(CLASSES);
  }
}
