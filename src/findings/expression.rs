//! Formulas as data: one tree prints the symbols, prints the numbers put in, and gives the result.

use std::ops::{Add, Div, Mul, Neg, Sub};

/// A symbol with an optional index, such as p with index max.
#[derive(Debug, Clone, PartialEq, Eq, PartialOrd, Ord, Hash)]
pub struct Symbol {
    /// The letter.
    pub letter: String,
    /// The index, empty when there is none.
    pub index: String,
}

impl Symbol {
    /// A symbol from its plain name: `p_max` has letter p and index max.
    pub fn new(plain: &str) -> Self {
        let (letter, index) = plain.split_once('_').unwrap_or((plain, ""));
        Self { letter: letter.to_owned(), index: index.to_owned() }
    }

    /// The plain name, such as `p_max`.
    pub fn plain(&self) -> String {
        if self.index.is_empty() { self.letter.clone() } else { format!("{}_{}", self.letter, self.index) }
    }
}

/// A formula.
#[derive(Debug, Clone, PartialEq)]
pub enum Expression {
    /// A number as it is printed.
    Number(String),
    /// A symbol.
    Symbol(Symbol),
    /// left + right.
    Sum(Box<Expression>, Box<Expression>),
    /// left − right.
    Difference(Box<Expression>, Box<Expression>),
    /// left · right.
    Product(Box<Expression>, Box<Expression>),
    /// numerator over denominator.
    Quotient(Box<Expression>, Box<Expression>),
    /// base to the power of a number as it is printed.
    Power(Box<Expression>, String),
    /// Square root.
    Root(Box<Expression>),
    /// Minus.
    Negative(Box<Expression>),
    /// A function of one argument.
    Call(Function, Box<Expression>),
    /// The greatest of several.
    Greatest(Vec<Expression>),
    /// The least of several.
    Least(Vec<Expression>),
}

/// Functions of one argument.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub enum Function {
    /// Natural logarithm.
    Ln,
    /// Logarithm to the base of ten.
    Lg,
    /// Tangent of an angle in radians.
    Tan,
    /// Absolute value.
    Abs,
}

impl Function {
    /// The name in plain text.
    pub fn name(self) -> &'static str {
        match self {
            Self::Ln => "ln",
            Self::Lg => "log10",
            Self::Tan => "tan",
            Self::Abs => "abs",
        }
    }
}

/// How tightly an operator binds: sum, product, negation, power, atom.
fn binding(expression: &Expression) -> u8 {
    match expression {
        Expression::Sum(..) | Expression::Difference(..) => 1,
        Expression::Negative(_) => 2,
        Expression::Product(..) | Expression::Quotient(..) => 3,
        Expression::Power(..) => 4,
        Expression::Number(text) if text.starts_with('-') => 2,
        Expression::Number(text) if text.contains('e') => 3,
        _ => 5,
    }
}

impl Expression {
    /// Whether `self`, standing below an operator that binds as `outer`, needs brackets.
    pub fn needs_brackets(&self, outer: u8) -> bool {
        binding(self) < outer
    }

    /// How tightly the outermost operator binds, 1 (sum) to 5 (a symbol).
    pub fn binding(&self) -> u8 {
        binding(self)
    }

    /// Value with the symbols looked up; none when a symbol is unknown.
    pub fn evaluate(&self, lookup: &dyn Fn(&Symbol) -> Option<f64>) -> Option<f64> {
        let value = |expression: &Expression| expression.evaluate(lookup);
        Some(match self {
            Self::Number(text) => text.parse().ok()?,
            Self::Symbol(symbol) => lookup(symbol)?,
            Self::Sum(a, b) => value(a)? + value(b)?,
            Self::Difference(a, b) => value(a)? - value(b)?,
            Self::Product(a, b) => value(a)? * value(b)?,
            Self::Quotient(a, b) => value(a)? / value(b)?,
            Self::Power(a, n) => match n.parse::<i32>() {
                Ok(whole) => value(a)?.powi(whole),
                Err(_) => value(a)?.powf(n.parse().ok()?),
            },
            Self::Root(a) => value(a)?.sqrt(),
            Self::Negative(a) => -value(a)?,
            Self::Call(Function::Ln, a) => value(a)?.ln(),
            Self::Call(Function::Lg, a) => value(a)?.log10(),
            Self::Call(Function::Tan, a) => value(a)?.tan(),
            Self::Call(Function::Abs, a) => value(a)?.abs(),
            Self::Greatest(all) => extreme(all, lookup, f64::max)?,
            Self::Least(all) => extreme(all, lookup, f64::min)?,
        })
    }

    /// Plain text with symbols, in the notation of a calculator: `*`, `/`, `^`, `sqrt(…)`.
    pub fn plain(&self) -> String {
        self.written(&|symbol| symbol.plain())
    }

    /// Plain text with the printed value of each symbol put in.
    pub fn substituted(&self, printed: &dyn Fn(&Symbol) -> String) -> String {
        self.written(&|symbol| {
            let text = printed(symbol);
            if text.starts_with('-') || text.contains('e') { format!("({text})") } else { text }
        })
    }

    fn written(&self, name: &dyn Fn(&Symbol) -> String) -> String {
        let inside = |expression: &Expression, outer: u8| {
            let text = expression.written(name);
            if expression.needs_brackets(outer) { format!("({text})") } else { text }
        };
        let list = |all: &[Expression]| {
            all.iter().map(|expression| expression.written(name)).collect::<Vec<_>>().join(", ")
        };
        match self {
            Self::Number(text) => text.clone(),
            Self::Symbol(symbol) => name(symbol),
            Self::Sum(a, b) => format!("{} + {}", inside(a, 1), inside(b, 2)),
            Self::Difference(a, b) => format!("{} - {}", inside(a, 1), inside(b, 2)),
            Self::Product(a, b) => format!("{} * {}", inside(a, 3), inside(b, 3)),
            Self::Quotient(a, b) => format!("{} / {}", inside(a, 3), inside(b, 4)),
            Self::Power(a, n) => format!("{}^{n}", inside(a, 5)),
            Self::Root(a) => format!("sqrt({})", a.written(name)),
            Self::Negative(a) => format!("-{}", inside(a, 3)),
            Self::Call(function, a) => format!("{}({})", function.name(), a.written(name)),
            Self::Greatest(all) => format!("max({})", list(all)),
            Self::Least(all) => format!("min({})", list(all)),
        }
    }

    /// Every symbol of the formula, in order of appearance, each once.
    pub fn symbols(&self) -> Vec<Symbol> {
        let mut found = Vec::new();
        self.collect(&mut found);
        found
    }

    fn collect(&self, found: &mut Vec<Symbol>) {
        match self {
            Self::Number(_) => {}
            Self::Symbol(symbol) => {
                if !found.contains(symbol) {
                    found.push(symbol.clone());
                }
            }
            Self::Sum(a, b) | Self::Difference(a, b) | Self::Product(a, b) | Self::Quotient(a, b) => {
                a.collect(found);
                b.collect(found);
            }
            Self::Power(a, _) | Self::Root(a) | Self::Negative(a) | Self::Call(_, a) => a.collect(found),
            Self::Greatest(all) | Self::Least(all) => all.iter().for_each(|one| one.collect(found)),
        }
    }

    /// This formula to a whole power.
    pub fn power(self, exponent: u8) -> Self {
        Self::Power(Box::new(self), exponent.to_string())
    }

    /// This formula to the power of a number as it is printed, such as `0.43`.
    pub fn power_of(self, exponent: &str) -> Self {
        Self::Power(Box::new(self), exponent.to_owned())
    }

    /// The square root of this formula.
    pub fn root(self) -> Self {
        Self::Root(Box::new(self))
    }

    /// A function of this formula.
    pub fn call(self, function: Function) -> Self {
        Self::Call(function, Box::new(self))
    }
}

fn extreme(
    all: &[Expression],
    lookup: &dyn Fn(&Symbol) -> Option<f64>,
    pick: fn(f64, f64) -> f64,
) -> Option<f64> {
    let mut values = all.iter().map(|one| one.evaluate(lookup));
    let first = values.next()??;
    values.try_fold(first, |best, value| value.map(|value| pick(best, value)))
}

/// A symbol from its plain name.
pub fn sym(plain: &str) -> Expression {
    Expression::Symbol(Symbol::new(plain))
}

/// A number as printed.
pub fn num(text: &str) -> Expression {
    Expression::Number(text.to_owned())
}

/// The greatest of several formulas.
pub fn greatest(all: impl IntoIterator<Item = Expression>) -> Expression {
    Expression::Greatest(all.into_iter().collect())
}

/// The least of several formulas.
pub fn least(all: impl IntoIterator<Item = Expression>) -> Expression {
    Expression::Least(all.into_iter().collect())
}

macro_rules! operator {
    ($trait:ident, $method:ident, $variant:ident) => {
        impl $trait for Expression {
            type Output = Expression;
            fn $method(self, other: Expression) -> Expression {
                Expression::$variant(Box::new(self), Box::new(other))
            }
        }
    };
}

operator!(Add, add, Sum);
operator!(Sub, sub, Difference);
operator!(Mul, mul, Product);
operator!(Div, div, Quotient);

impl Neg for Expression {
    type Output = Expression;
    fn neg(self) -> Expression {
        Expression::Negative(Box::new(self))
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    fn numbers(symbol: &Symbol) -> Option<f64> {
        match symbol.plain().as_str() {
            "a" => Some(3.0),
            "b" => Some(-2.0),
            "Q_h" => Some(0.5),
            _ => None,
        }
    }

    #[test]
    fn prints_brackets_only_where_the_tree_needs_them() {
        let formula = (num("1") + sym("Q_h").power(2)) / (num("1") - sym("Q_h").power(2)) + sym("a");
        assert_eq!(formula.plain(), "(1 + Q_h^2) / (1 - Q_h^2) + a");
        assert_eq!((sym("a") / (sym("b") * sym("a"))).plain(), "a / (b * a)");
        assert_eq!((sym("a") - (sym("b") - sym("a"))).plain(), "a - (b - a)");
        assert_eq!((-(sym("a") + sym("b"))).plain(), "-(a + b)");
        assert_eq!(sym("a").power(2).power(2).plain(), "(a^2)^2");
    }

    #[test]
    fn puts_negative_numbers_in_brackets() {
        let formula = sym("a") - sym("b");
        let text = formula.substituted(&|symbol| format!("{}", numbers(symbol).unwrap()));
        assert_eq!(text, "3 - (-2)");
    }

    #[test]
    fn gives_the_value_of_the_tree() {
        let formula = (num("1") + sym("Q_h").power(2)) / (num("1") - sym("Q_h").power(2));
        assert_eq!(formula.evaluate(&numbers), Some(1.25 / 0.75));
        assert_eq!(greatest([sym("a"), sym("b")]).evaluate(&numbers), Some(3.0));
        assert_eq!(least([sym("a"), sym("b")]).evaluate(&numbers), Some(-2.0));
        assert_eq!(sym("a").power_of("0.5").evaluate(&numbers), Some(3f64.sqrt()));
        assert_eq!(num("1000").call(Function::Lg).evaluate(&numbers), Some(3.0));
        assert_eq!(sym("unknown").evaluate(&numbers), None);
    }
}
