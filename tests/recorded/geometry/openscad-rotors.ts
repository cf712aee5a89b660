/** A rotor as an OpenSCAD program, and what it was drawn to be. */
export interface OpenScadRotor {
  readonly name: string;
  readonly program: string;
  readonly expected: {
    readonly blades: number;
    readonly hand: "right" | "left";
    readonly hubDiameterMm: number;
    readonly tipDiameterMm: number;
    readonly shroud: boolean;
  };
}

/** Few and small, as OpenSCAD is slow: flat plates, twisted extrusions and an elliptic blade in a ring. */
export const openScadRotors: readonly OpenScadRotor[] = [
  {
    name: "flat-plates-tilted",
    // Plates turned by +35° about their span rise with θ: a right-hand screw.
    program: `rotate([20,30,0]) translate([5,6,7]) difference() {
      union() {
        cylinder(r=21, h=20, $fn=36, center=true);
        intersection() {
          for (i=[0:4]) rotate(i*72) translate([37,0,0]) rotate([35,0,0]) cube([44,30,2.4], center=true);
          cylinder(r=57, h=60, $fn=60, center=true);
        }
      }
      cylinder(r=4, h=50, $fn=20, center=true);
    }`,
    expected: { blades: 5, hand: "right", hubDiameterMm: 42, tipDiameterMm: 114, shroud: false },
  },
  {
    name: "twisted-extrusions",
    // A negative twist in linear_extrude turns anticlockwise on the way up: right.
    program: `union() {
      cylinder(r=19, h=16, $fn=40);
      intersection() {
        for (i=[0:10]) rotate(i*360/11 + 3*(i%2)) translate([0,0,1])
          linear_extrude(height=14, twist=-30, slices=6) translate([15,-1]) square([45,2]);
        cylinder(r=56, h=40, $fn=64);
      }
    }`,
    expected: { blades: 11, hand: "right", hubDiameterMm: 38, tipDiameterMm: 112, shroud: false },
  },
  {
    name: "ring-left",
    program: `union() {
      difference() { cylinder(r=18, h=18, center=true, $fn=32); cylinder(r=3, h=30, center=true, $fn=16); }
      for (i=[0:6]) rotate(i*360/7) translate([36,0,0]) rotate([-40,0,0]) cube([38,20,2], center=true);
      difference() { cylinder(r=56, h=12, center=true, $fn=60); cylinder(r=53.5, h=30, center=true, $fn=60); }
    }`,
    expected: { blades: 7, hand: "left", hubDiameterMm: 36, tipDiameterMm: 107, shroud: true },
  },
];
