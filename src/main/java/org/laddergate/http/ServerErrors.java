package org.laddergate.http;

import java.nio.ByteBuffer;
import org.eclipse.jetty.http.HttpHeader;
import org.eclipse.jetty.server.Request;
import org.eclipse.jetty.server.Response;
import org.eclipse.jetty.server.handler.ErrorHandler;
import org.eclipse.jetty.util.Callback;

/** Answers what never reaches a route, such as broken HTTP, in the same form as everything else. */
final class ServerErrors extends ErrorHandler {
    @Override
    public boolean handle(Request request, Response response, Callback callback) {
        ProblemCode code = ProblemCode.ofServerStatus(response.getStatus());
        byte[] body = Problem.of(code, "The server could not serve the request.").json(RequestId.next());
        response.setStatus(code.status());
        response.getHeaders().put(HttpHeader.CONTENT_TYPE, Problem.CONTENT_TYPE);
        response.getHeaders().put(HttpHeader.CONTENT_LENGTH, body.length);
        if (code.status() == 503) {
            response.getHeaders().put(HttpHeader.RETRY_AFTER, "2");
        }
        response.write(true, ByteBuffer.wrap(body), callback);
        return true;
    }

    @Override
    public boolean errorPageForMethod(String method) {
        return true;
    }
}
