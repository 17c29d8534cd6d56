//! The form of a page: read as a browser would send it, changed, sent.

use reqwest::Response;

use super::helpers::Visitor;

/// Fields in the order of the page.
#[derive(Clone, Debug)]
pub struct PageForm(Vec<(String, String)>);

impl PageForm {
    /// The form on a page that is there.
    pub async fn of(visitor: &Visitor, path: &str) -> Self {
        Self::on(&visitor.page(path).await)
    }

    /// The form in the text of a page: the one with the survey's fields.
    pub fn on(page: &str) -> Self {
        let main = page.split("<main").nth(1).unwrap();
        let mut fields = Vec::new();
        let mut options: Option<(String, Option<String>)> = None;
        for tag in main.split('<') {
            if tag.starts_with("input") {
                let is_ticked = tag.contains("type=\"radio\"") || tag.contains("type=\"checkbox\"");
                let is_off = is_ticked && !tag.contains(" checked");
                fields.extend(attribute(tag, "name").filter(|_| !is_off).map(|name| (name, value(tag))));
            } else if tag.starts_with("select") {
                options = Some((attribute(tag, "name").unwrap(), None));
            } else if tag.starts_with("option") {
                // Those of a list of suggestions belong to no field.
                let Some((_, chosen)) = options.as_mut() else { continue };
                if chosen.is_none() || tag.contains(" selected") {
                    *chosen = Some(value(tag));
                }
            } else if tag.starts_with("/select") {
                let (name, chosen) = options.take().unwrap();
                fields.push((name, chosen.unwrap()));
            }
        }
        Self(fields)
    }

    /// What stands in a field.
    pub fn value(&self, name: &str) -> &str {
        let field = self.0.iter().find(|(field, _)| field == name);
        &field.unwrap_or_else(|| panic!("no field {name} in {:?}", self.0)).1
    }

    /// The same with some fields typed anew.
    pub fn with(mut self, typed: &[(&str, &str)]) -> Self {
        for (name, value) in typed {
            match self.0.iter_mut().find(|(field, _)| field == name) {
                Some((_, field)) => *field = (*value).to_owned(),
                None => self.0.push(((*name).to_owned(), (*value).to_owned())),
            }
        }
        self
    }

    /// Sends it.
    pub async fn send(&self, visitor: &Visitor, path: &str) -> Response {
        let fields: Vec<(&str, &str)> = self.0.iter().map(|(name, value)| (name.as_str(), value.as_str())).collect();
        visitor.post(path, &fields).await
    }
}

fn value(tag: &str) -> String {
    attribute(tag, "value").unwrap_or_default()
}

fn attribute(tag: &str, name: &str) -> Option<String> {
    let value = tag.split(&format!(" {name}=\"")).nth(1)?.split('"').next()?;
    Some(value.replace("&#39;", "'").replace("&#34;", "\"").replace("&#60;", "<").replace("&#38;", "&"))
}
