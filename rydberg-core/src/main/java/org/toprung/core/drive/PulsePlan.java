package org.toprung.core.drive;

import org.toprung.core.quantity.Frequency;
import org.toprung.core.quantity.Time;

/**
 * What a sequencer needs for one square pulse.
 *
 * @param duration length of the pulse
 * @param frequencyOffset what is added to the last laser's frequency, counted from bare N-photon
 *     resonance, to sit on the light-shifted resonance
 * @param rabi effective Rabi frequency over 2π during the pulse
 */
public record PulsePlan(Time duration, Frequency frequencyOffset, Frequency rabi) {}
