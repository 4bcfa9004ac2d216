//! The values of a joint file as a tree, each scalar exactly as it was typed.

/// A value of the tree.
#[derive(Debug, Clone, Copy, PartialEq, Eq, PartialOrd, Ord)]
pub(crate) struct NodeId(pub(crate) usize);

/// Where a value was written.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub(crate) enum Origin {
    /// In the file.
    File,
    /// In the change of this number from the command line.
    Set(usize),
}

/// What a value is.
#[derive(Debug, Clone, PartialEq)]
pub(crate) enum Content {
    /// Nothing stands there.
    Null,
    /// A text as typed.
    Scalar(String),
    /// A list.
    List(Vec<NodeId>),
    /// Keys with values, in the order of the file.
    Map(Vec<Entry>),
}

/// A key with its value.
#[derive(Debug, Clone, PartialEq)]
pub(crate) struct Entry {
    pub(crate) key: String,
    pub(crate) value: NodeId,
    /// The same key stands before it in the same section.
    pub(crate) repeated: bool,
}

#[derive(Debug, Clone)]
struct Node {
    content: Content,
    origin: Origin,
    /// Section or list that holds it, with its number there.
    parent: Option<(NodeId, usize)>,
}

/// All values of a joint file.
#[derive(Debug, Clone)]
pub(crate) struct Tree {
    nodes: Vec<Node>,
}

impl Tree {
    /// A tree with nothing in it.
    pub(super) fn empty() -> Self {
        Self { nodes: Vec::new() }
    }

    /// How many values it has.
    pub(super) fn len(&self) -> usize {
        self.nodes.len()
    }

    /// The whole document.
    pub(crate) fn root(&self) -> NodeId {
        NodeId(0)
    }

    /// What stands at `node`.
    pub(crate) fn content(&self, node: NodeId) -> &Content {
        self.nodes.get(node.0).map_or(&Content::Null, |found| &found.content)
    }

    /// Where `node` was written.
    pub(crate) fn origin(&self, node: NodeId) -> Origin {
        self.nodes.get(node.0).map_or(Origin::File, |found| found.origin)
    }

    /// The section or list that holds `node`, with its number there.
    pub(crate) fn parent(&self, node: NodeId) -> Option<(NodeId, usize)> {
        self.nodes.get(node.0).and_then(|found| found.parent)
    }

    /// The value of `key` in the section `node`.
    pub(crate) fn get(&self, node: NodeId, key: &str) -> Option<NodeId> {
        match self.content(node) {
            Content::Map(entries) => entries.iter().find(|entry| entry.key == key).map(|entry| entry.value),
            _ => None,
        }
    }

    /// The item of this number in the list `node`.
    pub(crate) fn item(&self, node: NodeId, number: usize) -> Option<NodeId> {
        match self.content(node) {
            Content::List(items) => items.get(number).copied(),
            _ => None,
        }
    }

    /// Numbers of the entries that lead from the root to `node`.
    pub(crate) fn steps(&self, node: NodeId) -> Vec<usize> {
        let mut steps = Vec::new();
        let mut at = node;
        while let Some((parent, number)) = self.parent(at) {
            steps.push(number);
            at = parent;
        }
        steps.reverse();
        steps
    }

    /// Dotted keys of `node`, such as `duty.0.torque`; empty for the root.
    pub(crate) fn key_path(&self, node: NodeId) -> String {
        let mut keys = Vec::new();
        let mut at = node;
        while let Some((parent, number)) = self.parent(at) {
            keys.push(match self.content(parent) {
                Content::Map(entries) => {
                    entries.get(number).map_or_else(String::new, |entry| entry.key.clone())
                }
                _ => number.to_string(),
            });
            at = parent;
        }
        keys.reverse();
        keys.join(".")
    }

    /// The key under which `node` stands; none in a list and at the root.
    pub(crate) fn key(&self, node: NodeId) -> Option<&str> {
        let (parent, number) = self.parent(node)?;
        match self.content(parent) {
            Content::Map(entries) => entries.get(number).map(|entry| entry.key.as_str()),
            _ => None,
        }
    }

    /// Adds a value.
    pub(crate) fn add(
        &mut self,
        content: Content,
        origin: Origin,
        parent: Option<(NodeId, usize)>,
    ) -> NodeId {
        self.nodes.push(Node { content, origin, parent });
        NodeId(self.nodes.len() - 1)
    }

    /// Puts other content at `node`, keeping the keys that lead to it.
    pub(crate) fn replace(&mut self, node: NodeId, content: Content, origin: Origin) {
        if let Some(found) = self.nodes.get_mut(node.0) {
            found.content = content;
            found.origin = origin;
        }
    }

    /// Puts a value under a new key at the end of the section `node`, which becomes one when it is empty.
    pub(crate) fn append(&mut self, node: NodeId, key: &str, content: Content, origin: Origin) -> NodeId {
        let number = match self.content(node) {
            Content::Map(entries) => entries.len(),
            _ => 0,
        };
        let value = self.add(content, origin, Some((node, number)));
        let repeated = self.get(node, key).is_some();
        let entry = Entry { key: key.to_owned(), value, repeated };
        if let Some(found) = self.nodes.get_mut(node.0) {
            match &mut found.content {
                Content::Map(entries) => entries.push(entry),
                content => *content = Content::Map(vec![entry]),
            }
        }
        value
    }

    /// Puts a value at the end of the list `node`, which becomes one when it is empty.
    pub(crate) fn push(&mut self, node: NodeId, content: Content, origin: Origin) -> NodeId {
        let number = match self.content(node) {
            Content::List(items) => items.len(),
            _ => 0,
        };
        let value = self.add(content, origin, Some((node, number)));
        if let Some(found) = self.nodes.get_mut(node.0) {
            match &mut found.content {
                Content::List(items) => items.push(value),
                content => *content = Content::List(vec![value]),
            }
        }
        value
    }
}
