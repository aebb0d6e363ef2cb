package org.toprung.core.drive;

import org.toprung.core.quantity.MagneticField;

/** Where the atom of a drive sits: position in the beams and static fields. */
record Site(MagneticField magnetic, StaticField electric, double x, double y, double z) {
  /** The middle of the beams, with no electric field and the magnetic one still to be given. */
  static final Site ORIGIN = new Site(null, StaticField.NONE, 0, 0, 0);

  Site with(MagneticField field) {
    return new Site(field, electric, x, y, z);
  }

  Site with(StaticField field) {
    return new Site(magnetic, field, x, y, z);
  }

  /** Position in metres. */
  Site at(double newX, double newY, double newZ) {
    return new Site(magnetic, electric, newX, newY, newZ);
  }

  Beam sees(Beam beam) {
    return beam.seenFrom(x, y, z);
  }
}
