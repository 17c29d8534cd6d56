//! From which address a request comes, as far as it can be believed.

use std::net::{IpAddr, Ipv4Addr, Ipv6Addr, SocketAddr};

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

impl Client {
    /// What is counted when a place is counted.
    pub fn network(self) -> IpAddr {
        network(self.address)
    }
}

/// A household has one IPv4 address, but a whole /64 of IPv6.
pub fn network(address: IpAddr) -> IpAddr {
    match address.to_canonical() {
        IpAddr::V6(v6) => Ipv6Addr::from_bits(v6.to_bits() >> 64 << 64).into(),
        v4 => v4,
    }
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

    fn address(text: &str) -> IpAddr {
        text.parse().unwrap()
    }

    #[test]
    fn only_a_proxy_of_ours_is_believed() {
        let headers = |line: &str| HeaderMap::from_iter([("x-forwarded-for".parse().unwrap(), line.parse().unwrap())]);
        let proxy = address("10.0.0.1");
        for (peer, line, believed_address) in [
            ("192.0.2.9", "198.51.100.7", "192.0.2.9"),
            ("10.0.0.1", "198.51.100.7", "198.51.100.7"),
            ("10.0.0.1", "203.0.113.5, 198.51.100.7", "198.51.100.7"),
            ("10.0.0.1", "198.51.100.7, 10.0.0.1", "198.51.100.7"),
            ("10.0.0.1", "nonsense", "10.0.0.1"),
        ] {
            assert_eq!(believed(address(peer), &headers(line), &[proxy]), address(believed_address), "{peer} {line}");
        }
    }

    #[test]
    fn a_household_does_not_get_more_by_changing_its_address() {
        assert_eq!(network(address("2001:db8:1:2:3:4:5:6")), network(address("2001:db8:1:2:ffff::1")));
        assert_ne!(network(address("2001:db8:1:2::1")), network(address("2001:db8:1:3::1")));
        assert_eq!(network(address("::ffff:192.0.2.1")), address("192.0.2.1"));
    }
}
