// Package force holds the mechanics of the drive of an engine whose shaft turns at constant speed: torque over
// a turn and the flywheel that it asks for, the forces in rods, guides and bearings of each mechanism, and the
// forces and couples by which the machine shakes its frame, with the counterweights against them.
//
// # Conventions
//
// The crank angle theta grows with time, omega [rad/s] is constant. Positions Y, velocities V = dY/dtheta and
// accelerations A = d2Y/dtheta2 of both bodies are those of package drive, upwards: towards the head. A force on
// a body is positive where it pushes the body up. The axial force P of a body is what it hands on to the drive,
// the gas force less its own inertia (Transmitted). Weight is left out: add -m g to the gas force where it counts.
//
// The plane of motion is seen such that the shaft turns counterclockwise: x to the right, y upwards, and the
// direction at the angle phi, counted from y in the sense of rotation, is (-sin phi, cos phi). The axis of a
// cylinder at the angle 0 stands upright. The crank pin of a body whose axis stands at the angle beta is at
// beta + pi + theta + lead, for package drive has the crank at the bottom at theta + lead = 0; lead is the phase
// for the first body and 0 for the second. So both bodies of a V with the included angle of the phase, the second
// cylinder ahead in the sense of rotation, may run on one pin. A Ross yoke has one pin, at theta from the x axis.
//
// Samples over one turn come in slices: rising angles theta[k] [rad] over less than a turn and weights weight[k]
// whose sum is 2 pi [rad], such that the sum of weight times value is the integral over a turn. They need not be
// evenly spaced. A peak is the largest of the samples: it falls short by at most curvature times the square of
// the spacing over 8.
//
// All functions count on a mechanism whose Check gave drive.None and on finite numbers; they then divide by
// nothing that can be zero, but where a doc comment says so. NaN goes in and comes out. None allocates.
//
// Everything here is derived from rigid bodies without play; bodies are balanced about the axes of their
// cylinders. What remains out: bending and torsion of the shaft, friction, oil films, forces in gears.
package force
