//! Press-in force against travel.

/// Force along the travel of a press-in.
#[derive(Debug, Clone, PartialEq)]
pub struct PressCurve {
    /// Force at each travel, from first touch to the seated position and a little beyond.
    pub points: Vec<PressPoint>,
    /// Travel at which the lead-in chamfer has entered and the full interference grips, m.
    pub lead_in: f64,
    /// Greatest force, N.
    pub peak_force: f64,
    /// Travel at which it occurs, m.
    pub peak_travel: f64,
    /// Force when seated, N.
    pub final_force: f64,
    /// Work done to the seated position, J.
    pub work: f64,
}

/// Force at one travel.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct PressPoint {
    /// Travel from first touch, m.
    pub travel: f64,
    /// Force, N.
    pub force: f64,
}
