//! Formulas as MathML Core, with letters or with the numbers put in.
//!
//! Only elements of MathML Core (W3C, *MathML Core*, 2024) are used: `mi`, `mn`, `mo`, `mtext`, `mspace`,
//! `mrow`, `mfrac`, `msqrt`, `msub`, `msup`, `msubsup`. Plain names become Greek letters: `sigma_max` is σ with index max.

use maud::{Markup, html};

use super::typeset::{self, MINUS, THIN, is_number, number, split_exponent};
use crate::findings::expression::{Expression, Function, Symbol};

/// A formula in letters, such as p = δ/(d·c), without the `math` element round it.
pub fn expression(formula: &Expression) -> Markup {
    Setter { value: None }.set(formula)
}

/// The formula with the printed value of each symbol put in; a symbol without value keeps its letter.
pub fn substituted(formula: &Expression, printed: &dyn Fn(&Symbol) -> Option<String>) -> Markup {
    Setter { value: Some(printed) }.set(formula)
}

/// A symbol with its index.
pub fn symbol(symbol: &Symbol) -> Markup {
    let letter = identifier(&symbol.letter);
    if symbol.index.is_empty() {
        return letter;
    }
    html! { msub { (letter) (index(symbol)) } }
}

fn index(symbol: &Symbol) -> Markup {
    let parts: Vec<&str> = symbol.index.split('_').filter(|part| !part.is_empty()).collect();
    html! {
        mrow {
            @for (place, part) in parts.iter().enumerate() {
                @if place > 0 { mo { "," } }
                (index_part(part))
            }
        }
    }
}

/// A printed number: true minus, powers of ten raised.
pub fn printed_number(plain: &str) -> Markup {
    let (mantissa, exponent) = split_exponent(plain);
    let Some(exponent) = exponent else { return unsigned_number(plain) };
    html! {
        mrow {
            (unsigned_number(mantissa))
            mo { "\u{00B7}" }
            msup { mn { "10" } (unsigned_number(&exponent)) }
        }
    }
}

/// A result with its unit, a thin space between.
pub fn with_unit(plain: &str, unit: &str) -> Markup {
    html! {
        (printed_number(plain))
        @if !unit.is_empty() { mtext { (THIN) (typeset::unit(unit)) } }
    }
}

fn unsigned_number(plain: &str) -> Markup {
    match plain.strip_prefix(['-', MINUS]) {
        Some(digits) => html! { mrow { mo form="prefix" { (MINUS) } mn { (number(digits)) } } },
        None if is_number(plain) => html! { mn { (number(plain)) } },
        None => html! { mtext { (plain) } },
    }
}

fn identifier(letter: &str) -> Markup {
    let letters = greek(letter);
    html! { mi { (letters) } }
}

/// An index: a number, one letter in italics, or a word upright.
fn index_part(part: &str) -> Markup {
    if is_number(part) {
        return html! { mn { (part) } };
    }
    let text = greek(part);
    if text.chars().count() == 1 {
        html! { mi { (text) } }
    } else {
        html! { mtext { (text) } }
    }
}

/// The Greek letter that the plain name stands for, also with a capital delta before (`dT` stays).
fn greek(plain: &str) -> String {
    if let Some((_, letter)) = GREEK.iter().find(|(name, _)| *name == plain) {
        return (*letter).to_owned();
    }
    match plain.strip_prefix("Delta") {
        Some(rest) => format!("Δ{}", greek(rest)),
        None => plain.to_owned(),
    }
}

const GREEK: [(&str, &str); 33] = [
    ("alpha", "α"),
    ("beta", "β"),
    ("gamma", "γ"),
    ("delta", "δ"),
    ("eps", "ε"),
    ("epsilon", "ε"),
    ("zeta", "ζ"),
    ("eta", "η"),
    ("theta", "θ"),
    ("kappa", "κ"),
    ("lambda", "λ"),
    ("mu", "μ"),
    ("nu", "ν"),
    ("xi", "ξ"),
    ("pi", "π"),
    ("rho", "ρ"),
    ("sigma", "σ"),
    ("tau", "τ"),
    ("phi", "φ"),
    ("chi", "χ"),
    ("psi", "ψ"),
    ("omega", "ω"),
    ("Gamma", "Γ"),
    ("Delta", "Δ"),
    ("Theta", "Θ"),
    ("Lambda", "Λ"),
    ("Xi", "Ξ"),
    ("Pi", "Π"),
    ("Sigma", "Σ"),
    ("Phi", "Φ"),
    ("Psi", "Ψ"),
    ("Omega", "Ω"),
    ("infinity", "∞"),
];

/// How tightly the outermost operator binds once typeset; a fraction bar groups by itself.
const SUM: u8 = 1;
const NEGATIVE: u8 = 2;
const PRODUCT: u8 = 3;
const ATOM: u8 = 5;

/// Printed value of a symbol, when it has one.
type Values<'a> = &'a dyn Fn(&Symbol) -> Option<String>;

struct Setter<'a> {
    value: Option<Values<'a>>,
}

impl Setter<'_> {
    fn set(&self, formula: &Expression) -> Markup {
        match formula {
            Expression::Number(text) => printed_number(text),
            Expression::Symbol(name) => match self.value_of(name) {
                Some(text) => printed_number(&text),
                None => symbol(name),
            },
            Expression::Sum(a, b) => html! { (self.inside(a, SUM)) mo { "+" } (self.inside(b, PRODUCT)) },
            Expression::Difference(a, b) => {
                html! { (self.inside(a, SUM)) mo { (MINUS) } (self.inside(b, PRODUCT)) }
            }
            Expression::Product(a, b) => {
                html! { (self.inside(a, PRODUCT)) (self.times(a, b)) (self.inside(b, PRODUCT)) }
            }
            Expression::Quotient(a, b) => {
                html! { mfrac { mrow { (self.set(a)) } mrow { (self.set(b)) } } }
            }
            Expression::Power(base, exponent) => self.power(base, exponent),
            Expression::Root(inner) => html! { msqrt { (self.set(inner)) } },
            Expression::Negative(inner) => {
                html! { mrow { mo form="prefix" { (MINUS) } (self.inside(inner, PRODUCT)) } }
            }
            Expression::Call(Function::Abs, inner) => fenced("|", &self.set(inner), "|"),
            Expression::Call(Function::Lg, inner) => self.function("lg", std::slice::from_ref(inner)),
            Expression::Call(function, inner) => self.function(function.name(), std::slice::from_ref(inner)),
            Expression::Greatest(all) => self.function("max", all),
            Expression::Least(all) => self.function("min", all),
        }
    }

    /// A power; an index and the exponent stand one above the other.
    fn power(&self, base: &Expression, exponent: &str) -> Markup {
        match base {
            Expression::Symbol(name) if !name.index.is_empty() && self.value_of(name).is_none() => {
                html! { msubsup { (identifier(&name.letter)) (index(name)) mn { (exponent) } } }
            }
            _ => html! { msup { mrow { (self.base(base)) } mn { (exponent) } } },
        }
    }

    fn value_of(&self, symbol: &Symbol) -> Option<String> {
        self.value.and_then(|value| value(symbol))
    }

    fn binding(&self, formula: &Expression) -> u8 {
        let number = |text: &str| {
            if text.starts_with(['-', MINUS]) {
                NEGATIVE
            } else if split_exponent(text).1.is_some() {
                PRODUCT
            } else {
                ATOM
            }
        };
        match formula {
            Expression::Number(text) => number(text),
            Expression::Symbol(name) => self.value_of(name).map_or(ATOM, |text| number(&text)),
            Expression::Sum(..) | Expression::Difference(..) => SUM,
            Expression::Negative(_) => NEGATIVE,
            Expression::Product(..) => PRODUCT,
            _ => ATOM,
        }
    }

    /// The formula, in brackets when it binds less tightly than its place asks.
    fn inside(&self, formula: &Expression, least: u8) -> Markup {
        let set = self.set(formula);
        if self.binding(formula) < least { fenced("(", &set, ")") } else { set }
    }

    /// The base of a power: brackets round everything but a letter, a number, a root or a bracket.
    fn base(&self, formula: &Expression) -> Markup {
        let set = self.set(formula);
        let alone = match formula {
            Expression::Symbol(_) | Expression::Number(_) => self.binding(formula) == ATOM,
            Expression::Root(_) | Expression::Call(Function::Abs, _) => true,
            _ => false,
        };
        if alone { set } else { fenced("(", &set, ")") }
    }

    /// A dot beside a number, a thin space between letters; 2 π d needs no dot after its leading number.
    fn times(&self, left: &Expression, right: &Expression) -> Markup {
        if self.ends_in_number(left) || self.begins_with_number(right) {
            html! { mo { "\u{00B7}" } }
        } else {
            html! { mo lspace="0" rspace="0" { "\u{2062}" } mspace width="0.17em" {} }
        }
    }

    fn ends_in_number(&self, formula: &Expression) -> bool {
        match formula {
            Expression::Product(_, right) => self.ends_in_number(right),
            Expression::Symbol(name) => self.value_of(name).is_some(),
            _ => self.value.is_some(),
        }
    }

    fn begins_with_number(&self, formula: &Expression) -> bool {
        match formula {
            Expression::Product(left, _) => self.begins_with_number(left),
            Expression::Power(base, _) => self.begins_with_number(base),
            Expression::Symbol(name) => self.value_of(name).is_some(),
            Expression::Number(_) => true,
            _ => self.value.is_some(),
        }
    }

    fn function<E: std::borrow::Borrow<Expression>>(&self, name: &str, arguments: &[E]) -> Markup {
        let list = html! {
            @for (place, argument) in arguments.iter().enumerate() {
                @if place > 0 { mo separator="true" { "," } }
                (self.set(argument.borrow()))
            }
        };
        html! { mrow { mi { (name) } mo lspace="0" rspace="0" { "\u{2061}" } (fenced("(", &list, ")")) } }
    }
}

fn fenced(open: &str, inside: &Markup, close: &str) -> Markup {
    html! {
        mrow {
            mo form="prefix" stretchy="true" { (open) }
            (inside)
            mo form="postfix" stretchy="true" { (close) }
        }
    }
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::findings::expression::{greatest, num, sym};

    fn set(formula: &Expression) -> String {
        expression(formula).into_string()
    }

    fn bare(markup: &str) -> String {
        let mut text = String::new();
        let mut inside = false;
        for c in markup.chars() {
            match c {
                '<' => inside = true,
                '>' => inside = false,
                c if !inside => text.push(c),
                _ => {}
            }
        }
        text
    }

    #[test]
    fn sets_greek_letters_and_indices() {
        assert_eq!(
            symbol(&Symbol::new("sigma_max")).into_string(),
            "<msub><mi>σ</mi><mrow><mtext>max</mtext></mrow></msub>"
        );
        assert_eq!(
            symbol(&Symbol::new("mu_2_theta")).into_string(),
            "<msub><mi>μ</mi><mrow><mn>2</mn><mo>,</mo><mi>θ</mi></mrow></msub>"
        );
        assert_eq!(symbol(&Symbol::new("DeltaT")).into_string(), "<mi>ΔT</mi>");
        assert_eq!(symbol(&Symbol::new("Rz")).into_string(), "<mi>Rz</mi>");
    }

    #[test]
    fn an_exponent_stands_above_the_index() {
        let markup = set(&sym("Q_h").power(2));
        assert_eq!(markup, "<msubsup><mi>Q</mi><mrow><mi>h</mi></mrow><mn>2</mn></msubsup>");
    }

    #[test]
    fn a_fraction_bar_needs_no_brackets() {
        let formula = (num("1") + sym("Q").power(2)) / (num("1") - sym("Q").power(2));
        assert_eq!(bare(&set(&formula)), "1+Q21−Q2");
        assert!(set(&formula).starts_with("<mfrac><mrow>"));
    }

    #[test]
    fn brackets_stand_where_the_tree_needs_them() {
        assert_eq!(bare(&set(&(sym("d") * (sym("a") + sym("b"))))), "d\u{2062}(a+b)");
        assert_eq!(bare(&set(&(sym("a") - (sym("b") - sym("c"))))), "a−(b−c)");
        assert_eq!(bare(&set(&((sym("a") / sym("b")).power(2)))), "(ab)2");
        assert_eq!(bare(&set(&-(sym("a") + sym("b")))), "−(a+b)");
        assert_eq!(bare(&set(&(sym("a") + sym("b")).call(Function::Abs))), "|a+b|");
        assert_eq!(bare(&set(&sym("a").call(Function::Ln))), "ln\u{2061}(a)");
        assert_eq!(bare(&set(&greatest([sym("a"), sym("b")]))), "max\u{2061}(a,b)");
    }

    #[test]
    fn numbers_put_in_have_dots_minus_signs_and_powers_of_ten() {
        let formula = sym("a") * sym("b") - sym("c");
        let values = |symbol: &Symbol| {
            let text = match symbol.letter.as_str() {
                "a" => "3",
                "b" => "1.2e-5",
                _ => "-0.3",
            };
            Some(text.to_owned())
        };
        assert_eq!(bare(&substituted(&formula, &values).into_string()), "3·1.2·10−5−(−0.3)");
        let power = sym("b").power(2);
        assert_eq!(bare(&substituted(&power, &values).into_string()), "(1.2·10−5)2");
    }

    #[test]
    fn a_symbol_without_value_keeps_its_letter() {
        let markup = substituted(&(sym("x") * sym("y")), &|_| None).into_string();
        assert_eq!(bare(&markup), "x\u{2062}y");
    }

    #[test]
    fn hostile_names_are_escaped() {
        let markup = symbol(&Symbol::new("<script>_<b>")).into_string();
        assert!(!markup.contains("<script>") && markup.contains("&lt;script&gt;"), "{markup}");
    }
}
