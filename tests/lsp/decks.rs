//! Makes decks of any length for the tests of the server: rooms side by side, each with its definitions, fluid, faces
//! and mesh.
#![allow(dead_code)]

use std::fmt::Write;

/// The lines that one room takes.
const ROOM: usize = 40;

/// A sound deck of about so many lines.
pub fn deck(lines: usize) -> String {
    let mut text = String::from(
        "# Rooms of one building, each by itself.\n\ncase \"Rooms\"\n    gravity        9.81 m/s^2 along -z\n\n",
    );
    for room in 0..lines.saturating_sub(8).div_ceil(ROOM) {
        let warm = 22 + room % 7;
        // Forty lines, the last one empty.
        let _ = write!(
            text,
            "# Room {room}: what is given of it.
given
    height_{room}   = 2.4 m            \"inside height\"
    width_{room}    = 0.5 * height_{room}
    T_cold_{room}   = 18 degC          \"outer face\"
    rise_{room}     = {rise} K            \"of the inner face over the outer one\"
    T_hot_{room}    = T_cold_{room} + rise_{room}

fluid air_{room}
    substance      air
    reference      {warm} degC at 1 bar
    density-law    boussinesq

region room_{room}
    box            width_{room} by 3 m by height_{room}
    filled with    air_{room}
    flow           laminar

boundary warm_{room} of room_{room}
    side           west
    wall
    held at        T_hot_{room}

boundary cold_{room} of room_{room}
    side           east
    wall
    held at        T_cold_{room}

boundary rest_{room} of room_{room}
    side           remaining
    wall
    insulated

mesh of room_{room}
    cells          60 by 80 by 100
    first-cell     2 mm
    growth         1.15

# --- {room} ---

",
            rise = 2 + room % 5,
        );
    }
    text.push_str("run\n    steady\n");
    text
}
