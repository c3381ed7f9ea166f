// Radio uplink in plain Verilog: sends a report of 32 bits, highest bit first, and a checksum of 8 bits behind it.
module uplink (clk, rst, start, report, ready, carrier, symbol, sent);
    input         clk, rst;        // synchronous reset
    input         start;
    input  [31:0] report;
    input         ready;           // the radio takes one symbol
    output        carrier;
    output        symbol;
    output [15:0] sent;            // reports since reset

    localparam [1:0] SILENT = 2'd0, WARM_UP = 2'd1, BODY = 2'd2, CHECK = 2'd3;

    reg [1:0]  state;
    reg [31:0] shift;
    reg [7:0]  checksum;
    reg [5:0]  remaining;
    reg [15:0] sent;

    assign carrier = state != SILENT;
    assign symbol  = (state == BODY) ? shift[31] : (state == CHECK) & checksum[7];

    always @(posedge clk) begin
        if (rst) begin
            state     <= SILENT;
            shift     <= 32'd0;
            checksum  <= 8'd0;
            remaining <= 6'd0;
            sent      <= 16'd0;
        end else case (state)
            SILENT:
                if (start) begin
                    state     <= WARM_UP;
                    shift     <= report;
                    remaining <= 6'd15;
                end
            WARM_UP:
                if (remaining != 6'd0) remaining <= remaining - 6'd1;
                else begin
                    state     <= BODY;
                    checksum  <= 8'hff;
                    remaining <= 6'd31;
                end
            BODY:
                if (ready) begin
                    shift    <= {shift[30:0], 1'b0};
                    checksum <= {checksum[6:0], checksum[7] ^ shift[31]} ^ {5'd0, checksum[7], 2'd0};
                    if (remaining != 6'd0) remaining <= remaining - 6'd1;
                    else begin
                        state     <= CHECK;
                        remaining <= 6'd7;
                    end
                end
            CHECK:
                if (ready) begin
                    checksum <= {checksum[6:0], 1'b0};
                    if (remaining != 6'd0) remaining <= remaining - 6'd1;
                    else begin
                        state <= SILENT;
                        sent  <= sent + 16'd1;
                    end
                end
        endcase
    end
endmodule
