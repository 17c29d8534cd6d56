//! The accept loop: deadlines for headers and whole requests, and an orderly end.

use std::convert::Infallible;
use std::net::SocketAddr;
use std::time::Duration;

use axum::Router;
use axum::body::Body;
use axum::extract::ConnectInfo;
use axum::http::{Request, StatusCode};
use hyper::body::Incoming;
use hyper_util::rt::{TokioExecutor, TokioIo, TokioTimer};
use hyper_util::server::conn::auto;
use hyper_util::server::graceful::GracefulShutdown;
use tokio::net::TcpListener;
use tower::ServiceExt;
use tower_http::timeout::TimeoutLayer;

/// A client must have sent its headers by then.
const HEADERS: Duration = Duration::from_secs(5);
/// A whole request must have been answered by then.
const REQUEST: Duration = Duration::from_secs(30);
/// At the end, open requests may take this long.
const END: Duration = Duration::from_secs(8);
/// Most bytes of headers.
const HEADER_BYTES: usize = 32 * 1024;

/// Answers on a listener until `stop` is done; then takes nothing new and finishes what is open.
pub async fn serve(listener: TcpListener, router: Router, stop: impl Future<Output = ()>) {
    let router = router.layer(TimeoutLayer::with_status_code(StatusCode::REQUEST_TIMEOUT, REQUEST));
    let graceful = GracefulShutdown::new();
    let mut stop = std::pin::pin!(stop);
    loop {
        let accepted = tokio::select! {
            accepted = listener.accept() => accepted,
            () = &mut stop => break,
        };
        match accepted {
            Ok((stream, peer)) => answer(stream, peer, router.clone(), &graceful),
            Err(error) => {
                tracing::warn!(error = %error, "a connection could not be accepted");
                tokio::time::sleep(Duration::from_millis(100)).await;
            }
        }
    }
    drop(listener);
    if tokio::time::timeout(END, graceful.shutdown()).await.is_err() {
        tracing::warn!("some requests were still open at the end");
    }
}

fn answer(stream: tokio::net::TcpStream, peer: SocketAddr, router: Router, graceful: &GracefulShutdown) {
    let service = hyper::service::service_fn(move |mut request: Request<Incoming>| {
        request.extensions_mut().insert(ConnectInfo(peer));
        let router = router.clone();
        async move {
            Ok::<_, Infallible>(router.oneshot(request.map(Body::new)).await.unwrap_or_else(|never| match never {}))
        }
    });
    let mut builder = auto::Builder::new(TokioExecutor::new());
    builder.http1().timer(TokioTimer::new()).header_read_timeout(HEADERS).max_buf_size(HEADER_BYTES);
    builder.http2().timer(TokioTimer::new()).max_header_list_size(HEADER_BYTES as u32);
    let connection = builder.serve_connection_with_upgrades(TokioIo::new(stream), service).into_owned();
    let watched = graceful.watch(connection);
    tokio::spawn(async move {
        if let Err(error) = watched.await {
            tracing::debug!(error = %error, "a connection ended early");
        }
    });
}
