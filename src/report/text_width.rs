//! Width of a line of text in the sans-serif face of the figures, without any font at hand.
//!
//! Widths are those of Helvetica in thousandths of the type size (Adobe Core 14 Font Metrics,
//! `Helvetica.afm`); Arial and Liberation Sans share them. Other faces differ by a few per cent, for which
//! [`text_width`] adds 5 %.

/// Widths of the printing ASCII characters from the blank on, thousandths of the type size.
const ASCII: [u16; 95] = [
    278, 278, 355, 556, 556, 889, 667, 191, 333, 333, 389, 584, 278, 333, 278, 278, 556, 556, 556, 556, 556,
    556, 556, 556, 556, 556, 278, 278, 584, 584, 584, 556, 1015, 667, 667, 722, 722, 667, 611, 778, 722, 278,
    500, 667, 556, 833, 722, 778, 667, 778, 722, 667, 611, 722, 667, 944, 667, 667, 611, 278, 278, 278, 469,
    556, 333, 556, 556, 500, 556, 556, 278, 556, 556, 222, 222, 500, 222, 833, 556, 556, 556, 556, 333, 500,
    278, 556, 500, 722, 500, 500, 500, 334, 260, 334, 584,
];

/// Width of `text` at type size `size`, in the unit of `size`, with 5 % to spare.
pub(crate) fn text_width(text: &str, size: f64) -> f64 {
    let thousandths: u32 = text.chars().map(thousandths).sum();
    f64::from(thousandths) / 1000.0 * size * 1.05
}

/// The text, cut and ended with … so that it is not wider than `limit`.
pub(crate) fn fitted(text: &str, size: f64, limit: f64) -> String {
    if text_width(text, size) <= limit {
        return text.to_owned();
    }
    let mut cut = String::new();
    for c in text.chars() {
        if text_width(&format!("{cut}{c}…"), size) > limit {
            break;
        }
        cut.push(c);
    }
    format!("{}…", cut.trim_end())
}

fn thousandths(c: char) -> u32 {
    match c {
        ' '..='~' => u32::from(ASCII.get(c as usize - 32).copied().unwrap_or(1000)),
        '\u{2009}' | '\u{202F}' => 250,
        '\u{2212}' | '×' | '±' => 584,
        '·' => 333,
        '°' => 400,
        'Ø' => 778,
        '⁰'..='⁹' | '⁻' | '¹' | '²' | '³' => 400,
        '\u{2000}'..='\u{20FF}' => 1000,
        '\u{00A0}'..='\u{04FF}' => 700,
        _ => 1050,
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    /// Helvetica.afm: A 667, V 667; ten digits of 556.
    #[test]
    fn adds_up_the_published_widths() {
        approx::assert_relative_eq!(text_width("AV", 10.0), 1.334 * 10.0 * 1.05);
        approx::assert_relative_eq!(text_width("0123456789", 1.0), 5.56 * 1.05, epsilon = 1e-12);
    }

    #[test]
    fn cuts_a_long_text_to_the_limit() {
        let text = fitted("quenched and tempered steel for the very long name", 10.0, 80.0);
        assert!(text.ends_with('…'), "{text}");
        assert!(text_width(&text, 10.0) <= 80.0);
        assert_eq!(fitted("short", 10.0, 80.0), "short");
    }
}
