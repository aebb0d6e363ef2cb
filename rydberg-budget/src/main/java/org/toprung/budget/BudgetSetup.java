package org.toprung.budget;

import org.toprung.budget.bench.Bench;
import org.toprung.budget.pulse.Pulse;
import org.toprung.core.drive.Drive;

/** A drive and a pulse, waiting for a bench. Immutable. */
public final class BudgetSetup {
  private final Drive drive;
  private final Pulse pulse;
  private final Bench bench;

  BudgetSetup(Drive drive, Pulse pulse, Bench bench) {
    if (drive == null || pulse == null || bench == null) {
      throw new IllegalArgumentException("a budget needs a drive, a pulse and a bench, not null");
    }
    this.drive = drive;
    this.pulse = pulse;
    this.bench = bench;
  }

  /**
   * Sets the disturbances.
   *
   * @param newBench the bench
   * @return a copy on this bench
   */
  public BudgetSetup on(Bench newBench) {
    return new BudgetSetup(drive, pulse, newBench);
  }

  /**
   * Computes the budget.
   *
   * @return the budget
   * @throws IllegalArgumentException if the bench does not have one value per step of the drive
   */
  public Budget compose() {
    return new Budget(drive, pulse, bench);
  }
}
