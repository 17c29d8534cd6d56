//! From which address a request comes, as far as it can be believed.

use std::net::{IpAddr, Ipv4Addr, SocketAddr};

use axum::extract::{ConnectInfo, FromRequestParts};
use axum::http::HeaderMap;
use axum::http::request::Parts;

use super::app::App;

/// The caller.
#[derive(Clone, Copy, Debug)]
pub struct Client {
    /// Its address: the peer's, or what a proxy of ours says.
    pub address: IpAddr,
}

impl FromRequestParts<App> for Client {
    type Rejection = std::convert::Infallible;

    async fn from_request_parts(parts: &mut Parts, app: &App) -> Result<Self, Self::Rejection> {
        let peer = parts.extensions.get::<ConnectInfo<SocketAddr>>().map(|info| info.0.ip());
        let peer = peer.unwrap_or(IpAddr::V4(Ipv4Addr::UNSPECIFIED));
        Ok(Self { address: believed(peer, &parts.headers, &app.config.trusted_proxies) })
    }
}

/// The right-most hop that is no proxy of ours; a header from anybody else is not looked at.
fn believed(peer: IpAddr, headers: &HeaderMap, proxies: &[IpAddr]) -> IpAddr {
    if !proxies.contains(&peer.to_canonical()) {
        return peer;
    }
    let lines: Vec<&str> = headers.get_all("x-forwarded-for").iter().filter_map(|line| line.to_str().ok()).collect();
    let hops = lines.iter().flat_map(|line| line.split(',')).rev();
    let hop =
        hops.map_while(|hop| hop.trim().parse::<IpAddr>().ok()).find(|hop| !proxies.contains(&hop.to_canonical()));
    hop.unwrap_or(peer)
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn only_a_proxy_of_ours_is_believed() {
        let at = |text: &str| text.parse::<IpAddr>().unwrap();
        let headers = |line: &str| HeaderMap::from_iter([("x-forwarded-for".parse().unwrap(), line.parse().unwrap())]);
        let proxy = at("10.0.0.1");
        for (peer, line, believed_address) in [
            ("192.0.2.9", "198.51.100.7", "192.0.2.9"),
            ("10.0.0.1", "198.51.100.7", "198.51.100.7"),
            ("10.0.0.1", "203.0.113.5, 198.51.100.7", "198.51.100.7"),
            ("10.0.0.1", "198.51.100.7, 10.0.0.1", "198.51.100.7"),
            ("10.0.0.1", "nonsense", "10.0.0.1"),
        ] {
            assert_eq!(believed(at(peer), &headers(line), &[proxy]), at(believed_address), "{peer} {line}");
        }
    }
}
